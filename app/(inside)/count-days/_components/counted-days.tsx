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
          <th scope="col">Day</th>
          <th scope="col">Counts</th>
        </tr>
      </thead>
      <tbody>
        {days.map((day, index) => (
          <tr key={`${day.on}-${index}`} className={day.counted ? undefined : 'text-ink-2'}>
            <td className="mono py-1">{formatDate(day.on)}</td>
            <td className="py-1">{day.counted ? day.reason : `no: ${day.reason}`}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
