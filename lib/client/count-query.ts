/** What the address of the day counter asks, as its schema reads it; null where it asks nothing. */
export interface CountQuestion {
  start?: string
  length?: number
  unit?: string
  direction?: string
  calendar?: string
  roll?: string
  receipt?: string
  includeStart?: boolean
}

export function countQuery(
  query: Record<string, string | string[] | undefined>,
): CountQuestion | null {
  const text = (name: string) => {
    const value = query[name]
    return typeof value === 'string' && value !== '' ? value : undefined
  }
  if (text('start') === undefined && text('length') === undefined) return null
  const length = text('length')
  const question = {
    start: text('start'),
    length: length === undefined ? undefined : Number(length),
    unit: text('unit') ?? 'business_day',
    direction: text('direction'),
    calendar: text('calendar'),
    roll: text('roll'),
    receipt: text('receipt'),
    includeStart: text('includeStart') === undefined ? undefined : true,
  }
  return Object.fromEntries(Object.entries(question).filter(([, value]) => value !== undefined))
}
