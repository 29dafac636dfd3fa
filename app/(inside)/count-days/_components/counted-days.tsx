import { formatDate } from '@/lib/domain/format-date'

interface Props {
  days: { on: string; counted: boolean; reason: string }[]
}

/** Every day of the count, those that did not count in lighter ink with their reason. */
export function CountedDays({ days }: Props) {
  return (
    <table className="mt-5 w-full max-w-xl">
      <thead>
        <tr>
          <th scope="col" className="cap border-ink border-b-[1.5px] py-2 text-left">
            Day
          </th>
          <th scope="col" className="cap border-ink border-b-[1.5px] py-2 text-left">
            Counts
          </th>
        </tr>
      </thead>
      <tbody>
        {days.map((day, index) => (
          <tr
            key={`${day.on}-${index}`}
            className={day.counted ? 'border-rule border-b' : 'border-rule text-ink-2 border-b'}
          >
            <td className="mono w-44 py-1.5">{formatDate(day.on)}</td>
            <td className="py-1.5">{day.counted ? day.reason : `no: ${day.reason}`}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
