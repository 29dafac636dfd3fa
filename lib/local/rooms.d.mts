export interface Room {
  folder: string
  may: string[] | 'anything'
  packages?: string[]
  never?: string[]
}

export const rooms: Room[]
export const serverRooms: string[]
export const neverInTheWeb: string[]
export function roomOf(path: string): Room | null
export function isOneOf(names: string[], specifier: string): boolean
export function mayImport(room: Room, path: string): boolean
