import { StateWord } from '@/components/ui/state-word'
import { formatDate } from '@/lib/domain/format-date'
import type { ApplicationView, ItemView } from '@/lib/schemas/application'

type Line = ItemView['derivation'][number]

const kindWords: Record<string, string> = {
  start: 'Start',
  receipt: 'Receipt',
  count: 'Count',
  skip: 'Not counted',
  roll: 'Roll',
  stop: 'Stop',
  extension: 'Extension',
  cap: 'Limit',
  hour: 'Hour',
  stated: 'Stated',
  presumed: 'Presumed',
  provisional: 'Provisional',
  done: 'Done',
  note: 'Note',
  source: 'Source',
}

/** How the date came about, line by line, to be checked by hand with a calendar. */
export function Derivation({ item, view }: { item: ItemView; view: ApplicationView }) {
  const lines = item.derivation
  return (
    <section>
      <h3 className="border-rule mb-1 border-b pb-1">
        {item.dueOn ? 'How the date was counted' : 'How it stands'}
      </h3>
      <Difference item={item} todayOn={view.todayOn} />
      <ol>
        {lines.map((line, index) => (
          <li
            key={`${index} ${line.text}`}
            className="border-rule-2 grid grid-cols-[6.5rem_minmax(0,1fr)] gap-x-3 border-b py-1.5 last:border-b-0"
          >
            <span className="cap pt-0.5">{captionOf(lines, index)}</span>
            <span>
              {line.text}
              {line.kind === 'source' && <Basis basis={item.source.basis} />}
            </span>
          </li>
        ))}
      </ol>
    </section>
  )
}

/** A caption once for several lines of its kind. */
function captionOf(lines: readonly Line[], index: number): string {
  const kind = lines[index]?.kind ?? ''
  return lines[index - 1]?.kind === kind ? '' : (kindWords[kind] ?? kind)
}

function Basis({ basis }: { basis: string }) {
  if (basis !== 'from_memory') return null
  return (
    <span className="block text-sm">
      <StateWord tone="soon">Check it against the tariff before you rely on it.</StateWord>
    </span>
  )
}

function Difference({ item, todayOn }: { item: ItemView; todayOn: string }) {
  const { dueOn, statedDueOn } = item
  if (!dueOn || !statedDueOn || dueOn === statedDueOn) return null
  return (
    <p className="border-soon my-2 border-l-4 pl-3.5">
      They say {formatDate(statedDueOn, todayOn)}, our count says {formatDate(dueOn, todayOn)}. We
      work to the earlier; ask which one counts and record the answer.
    </p>
  )
}
