import type { Channel } from '@/lib/domain/clocks/facts'

export type Direction = 'in' | 'out'
export type Visibility = 'internal' | 'shareable'

/** Who an entry is for unless somebody says otherwise: notes of a call stay inside. */
export function usualVisibility(channel: Channel): Visibility {
  return channel === 'call' ? 'internal' : 'shareable'
}

/** How correspondence went, as people say it. */
export const channelWords: Record<Channel, string> = {
  call: 'Call',
  email: 'E-mail',
  letter: 'Letter',
  meeting: 'Meeting',
  portal: 'Portal message',
  hand: 'Hand delivery',
}

/** "E-mail in", "Call out"; a meeting has no direction. */
export function channelAndDirection(channel: Channel, direction: Direction): string {
  return channel === 'meeting' ? channelWords.meeting : `${channelWords[channel]} ${direction}`
}
