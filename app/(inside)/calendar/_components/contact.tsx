import type { CalendarEvent } from '@/lib/schemas/calendar-event'

const words = { ours: 'ours', theirs: 'theirs', both: 'ours and theirs', gate: 'a gate' }

/** The contact of the step line beside an entry: round ours, square theirs, a bar for a gate. */
export function Contact({ event }: { event: CalendarEvent }) {
  const side = event.kind === 'gate' ? 'gate' : sideOf(event)
  const width = side === 'both' ? 18 : 10
  return (
    <svg
      width={width}
      height="10"
      viewBox={`0 0 ${width} 10`}
      role="img"
      aria-label={words[side]}
      className="mt-1 shrink-0"
    >
      {side === 'gate' && <rect x="3" y="0" width="3.5" height="10" fill="currentColor" />}
      {(side === 'ours' || side === 'both') && (
        <circle cx="5" cy="5" r="3.6" fill="none" stroke="currentColor" strokeWidth="1.8" />
      )}
      {(side === 'theirs' || side === 'both') && (
        <rect
          x={side === 'both' ? 10.4 : 1.4}
          y="1.4"
          width="7.2"
          height="7.2"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.8"
        />
      )}
    </svg>
  )
}

function sideOf(event: CalendarEvent): 'ours' | 'theirs' | 'both' {
  if (event.party === 'both') return 'both'
  return event.party === 'applicant' ? 'ours' : 'theirs'
}
