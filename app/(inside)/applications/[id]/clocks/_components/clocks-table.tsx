import { otherDateWords } from '@/components/pipeline/clock-text'
import { clsx } from 'clsx'
import Link from 'next/link'
import { ClockDetail } from '@/app/(inside)/applications/[id]/clocks/_components/clock-detail'
import type { ClockMay } from '@/app/(inside)/applications/[id]/clocks/_components/clock-actions'
import type { Holder } from '@/app/(inside)/applications/[id]/clocks/_components/assign-menu'
import {
  clockKey,
  dueWords,
  leftTone,
  leftWords,
  stateWords,
  whoseWords,
} from '@/components/applications/clock-words'
import { LeftFigure } from '@/components/ui/left-figure'
import { RowOpener } from '@/components/ui/row-opener'
import { StateWord } from '@/components/ui/state-word'
import { formatShortDate } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import type { ApplicationView, ItemView } from '@/lib/schemas/application'

export interface ClocksTableProps {
  view: ApplicationView
  may: ClockMay
  people: readonly Holder[]
  /** The key of the clock whose count is shown. */
  open?: string
  /** Also the steps that this request does not need. */
  showsAll: boolean
}

const headers = ['Step', 'Whose', 'State', 'Started', 'Due', 'Left', 'Done'] as const

/** All steps by stage; a row opens its derivation below itself, at its own address. */
export function ClocksTable(props: ClocksTableProps) {
  const { view, showsAll } = props
  const steps = view.items.filter((item) => item.obligation === '')
  const hidden = steps.filter((item) => item.status === 'not_needed')
  const shown = showsAll ? steps : steps.filter((item) => item.status !== 'not_needed')
  const groups = view.procedure.stages
    .map((stage) => ({ stage, items: shown.filter((item) => item.stage === stage) }))
    .filter((group) => group.items.length > 0)
  return (
    <>
      <div className="max-lg:overflow-x-auto">
        <table role="table" className="w-full border-separate border-spacing-0 max-sm:block">
          <caption className="sr-only">Steps of the procedure with their clocks</caption>
          <thead role="rowgroup" className="max-sm:sr-only">
            <tr role="row">
              {headers.map((header) => (
                <th
                  key={header}
                  role="columnheader"
                  scope="col"
                  className="border-ink bg-film text-th text-ink-2 border-b-[1.5px] py-2 pr-4 text-left font-medium font-stretch-[86%] last:pr-0"
                >
                  {header}
                </th>
              ))}
            </tr>
          </thead>
          <RowOpener>
            {groups.map((group) => (
              <StageRows key={group.stage} {...group} table={props} />
            ))}
          </RowOpener>
        </table>
      </div>
      {hidden.length > 0 && (
        <p className="mt-3 text-sm">
          <Link
            href={routes.application(view.id, 'clocks', { all: showsAll ? undefined : 1 })}
            scroll={false}
            className="underline underline-offset-3"
          >
            {showsAll
              ? 'Hide the steps this request does not need'
              : `Show ${hidden.length} steps this request does not need`}
          </Link>
        </p>
      )}
    </>
  )
}

interface StageRowsProps {
  stage: string
  items: readonly ItemView[]
  table: ClocksTableProps
}

function StageRows({ stage, items, table }: StageRowsProps) {
  return (
    <>
      <tr role="row" className="max-sm:block">
        <th
          role="rowheader"
          scope="rowgroup"
          colSpan={headers.length}
          className="border-rule border-b pt-6 pb-1.5 text-left max-sm:block"
        >
          <h2>{stage}</h2>
        </th>
      </tr>
      {items.map((item) => (
        <ClockRows key={clockKey(item)} item={item} table={table} />
      ))}
    </>
  )
}

function ClockRows({ item, table }: { item: ItemView; table: ClocksTableProps }) {
  const key = clockKey(item)
  const isOpen = table.open === key
  return (
    <>
      <ClockRow item={item} table={table} isOpen={isOpen} />
      {isOpen && (
        <tr role="row" className="max-sm:block">
          <td
            role="cell"
            colSpan={headers.length}
            className="border-ink bg-sheet border-b-[1.5px] px-4 pt-3 pb-5 max-sm:block"
          >
            <ClockDetail item={item} view={table.view} may={table.may} people={table.people} />
          </td>
        </tr>
      )}
    </>
  )
}

const cell = 'border-rule border-b py-2.5 pr-4 align-middle last:pr-0 max-sm:border-0 max-sm:p-0'
const aside = 'max-sm:col-start-2 max-sm:row-start-1 max-sm:justify-self-end max-sm:text-right'
const line =
  'max-sm:col-span-2 max-sm:flex max-sm:items-baseline max-sm:justify-between max-sm:gap-4'

function ClockRow(props: { item: ItemView; table: ClocksTableProps; isOpen: boolean }) {
  const { item, table, isOpen } = props
  const { view, showsAll } = table
  const key = clockKey(item)
  const state = stateWords(item)
  const hasFigure = leftTone(item) !== null
  const isAhead = item.status === 'waiting' || item.status === 'not_needed'
  const href = routes.application(view.id, 'clocks', {
    open: isOpen ? undefined : key,
    all: showsAll ? 1 : undefined,
  })
  return (
    <tr
      role="row"
      id={`clock-${key}`}
      className={clsx(
        'border-rule hover:bg-sheet scroll-mt-6 has-[a[data-row-link]]:cursor-pointer max-sm:grid max-sm:grid-cols-[minmax(0,1fr)_auto] max-sm:gap-x-4 max-sm:gap-y-1 max-sm:border-b max-sm:py-3',
        isAhead && 'text-ink-2',
        isOpen && 'bg-sheet',
      )}
    >
      <td role="cell" className={clsx(cell, 'max-sm:col-start-1', !isAhead && 'font-semibold')}>
        <Link
          data-row-link
          href={href}
          scroll={false}
          aria-expanded={isOpen}
          className="no-underline"
        >
          {item.title}
          {item.instance > 1 && `, round ${item.instance}`}
        </Link>
      </td>
      <td role="cell" className={clsx(cell, isAhead ? 'max-sm:hidden' : line)}>
        <Caption>Whose</Caption>
        {whoseWords(item.party)}
      </td>
      <td role="cell" className={clsx(cell, hasFigure ? line : aside)}>
        {hasFigure && <Caption>State</Caption>}
        <StateWord tone={state.tone}>{state.text}</StateWord>
      </td>
      <DateCell
        caption="Started"
        text={item.startOn && formatShortDate(item.startOn, view.todayOn)}
      />
      <DateCell caption="Due" text={dueText(item, view.todayOn)} />
      <td role="cell" className={clsx(cell, hasFigure ? aside : 'max-sm:hidden')}>
        <Left item={item} />
      </td>
      <DoneCell item={item} view={view} />
    </tr>
  )
}

function dueText(item: ItemView, todayOn: string): string | null {
  const due = dueWords(item, todayOn)
  if (!due) return null
  const other = item.status === 'open' ? otherDateWords(item, todayOn) : null
  return [due, item.provisional && 'provisional', other].filter(Boolean).join(', ')
}

function DoneCell({ item, view }: { item: ItemView; view: ApplicationView }) {
  const isDone = item.status === 'done' || item.status === 'waived'
  const date = item.doneOn ? formatShortDate(item.doneOn, view.todayOn) : 'date not known'
  const outcome = outcomeOf(item, view)
  return (
    <td role="cell" className={clsx(cell, isDone ? line : 'max-sm:hidden')}>
      {isDone && (
        <>
          <Caption>Done</Caption>
          <span className="max-sm:text-right">
            <span className="mono">{date}</span>
            {outcome && <span className="text-ink-2 block text-sm">{outcome}</span>}
          </span>
        </>
      )}
    </td>
  )
}

/** The outcome in the procedure's words, where the step can end in more than one way. */
function outcomeOf(item: ItemView, view: ApplicationView): string | undefined {
  const step = view.settled.find((one) => one.step === item.step && one.instance === item.instance)
  if (!step || step.outcomes.length < 2) return undefined
  return step.outcomes.find((one) => one.key === item.outcome)?.title
}

function Caption({ children }: { children: string }) {
  return <span className="cap font-sans sm:hidden">{children}</span>
}

function DateCell({ caption, text }: { caption: string; text: string | null }) {
  return (
    <td role="cell" className={clsx(cell, 'mono', text === null ? 'max-sm:hidden' : line)}>
      <Caption>{caption}</Caption>
      {text}
    </td>
  )
}

function Left({ item }: { item: ItemView }) {
  const tone = leftTone(item)
  if (tone) return <LeftFigure tone={tone}>{leftWords(item)}</LeftFigure>
  return null
}
