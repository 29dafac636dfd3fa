import { clsx } from 'clsx'
import Link from 'next/link'
import {
  clockKey,
  dueWords,
  isOurs,
  leftTone,
  leftWords,
  whoseWords,
} from '@/components/applications/clock-words'
import { FactButton } from '@/components/applications/fact-button'
import { formatDollars } from '@/components/applications/money-words'
import { runningItemOf } from '@/components/line/clock-of-items'
import { LeftFigure } from '@/components/ui/left-figure'
import { formatDate, formatShortDate } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import type { ApplicationView, ItemView } from '@/lib/schemas/application'

interface OpenNowProps {
  view: ApplicationView
  mayRecord: boolean
}

/** What runs now: the clock to work to with its parts, then what else is open, ours and theirs. */
export function OpenNow({ view, mayRecord }: OpenNowProps) {
  const open = view.items.filter(
    (item) =>
      item.obligation === '' &&
      item.onLine &&
      (item.status === 'open' || item.status === 'stopped') &&
      item.standing.state !== 'not_begun',
  )
  const first = runningItemOf(open)
  const rest = open.filter((item) => item !== first)
  const ours = rest.filter(isOurs)
  const theirs = rest.filter((item) => !isOurs(item))
  if (open.length === 0) return <NothingOpen standing={view.standing} />
  return (
    <div className="grid gap-8">
      {first && <Running item={first} view={view} mayRecord={mayRecord} />}
      <OpenList
        title={first ? 'Also open, ours' : 'Open, ours'}
        items={ours}
        view={view}
        mayRecord={mayRecord}
      />
      <OpenList title="The utility owes" items={theirs} view={view} mayRecord={mayRecord} />
    </div>
  )
}

function NothingOpen({ standing }: Pick<ApplicationView, 'standing'>) {
  return (
    <section>
      <h2 className="border-rule border-b pb-2">Nothing is open</h2>
      <p className="text-ink-2 py-3">
        {standing === 'withdrawn'
          ? 'The request is withdrawn; nothing is owed on it.'
          : 'Every step of the procedure is closed.'}
      </p>
    </section>
  )
}

function partsOf(view: ApplicationView, item: ItemView): ItemView[] {
  return view.items.filter(
    (one) => one.obligation !== '' && one.step === item.step && one.instance === item.instance,
  )
}

interface RowProps {
  item: ItemView
  view: ApplicationView
  mayRecord: boolean
}

function Running({ item, view, mayRecord }: RowProps) {
  const parts = partsOf(view, item)
  const by = dueWords(item, view.todayOn)
  const name = item.short ?? item.title
  const whose = isOurs(item) ? '' : 'They owe: '
  const heading =
    parts.length > 1
      ? `${whose}${name}, ${allWords(parts.length)} by ${by}`
      : `${whose}${name} by ${by}`
  return (
    <section aria-labelledby="running">
      <h2 id="running" className="border-rule border-b pb-2">
        {heading}
      </h2>
      <ul>
        <Row item={item} view={view} mayRecord={mayRecord} />
        {parts.map((part) => (
          <Row key={part.obligation} item={part} view={view} mayRecord={mayRecord} />
        ))}
      </ul>
    </section>
  )
}

function allWords(count: number): string {
  return ['', 'it', 'both', 'all three', 'all four', 'all five'][count] ?? `all ${count}`
}

interface OpenListProps {
  title: string
  items: readonly ItemView[]
  view: ApplicationView
  mayRecord: boolean
}

function OpenList({ title, items, view, mayRecord }: OpenListProps) {
  if (items.length === 0) return null
  return (
    <section>
      <h2 className="border-rule border-b pb-2">{title}</h2>
      <ul>
        {items.map((item) => (
          <Row key={clockKey(item)} item={item} view={view} mayRecord={mayRecord} />
        ))}
      </ul>
    </section>
  )
}

/* The figure keeps its own column, so that the presses of all rows stand in one line. */
function Row({ item, view, mayRecord }: RowProps) {
  const isPart = item.obligation !== ''
  const isDone = item.status === 'done' || item.status === 'waived'
  const round = item.instance > 1 ? `, round ${item.instance}` : ''
  return (
    <li className="border-rule grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-5 gap-y-1 border-b py-3 sm:grid-cols-[minmax(0,1fr)_7rem_auto]">
      <div className={clsx('min-w-0 max-sm:row-span-2', isPart && 'pl-5')}>
        <p className="font-semibold">
          <Link href={clockHref(view, item)} className="no-underline hover:underline">
            {item.title}
            {round}
          </Link>
        </p>
        <p className="text-ink-2 text-sm">{underWords(item, view)}</p>
        <Consequence item={item} />
      </div>
      <div className="text-right">
        <Left item={item} todayOn={view.todayOn} isDone={isDone} />
      </div>
      {mayRecord && !isDone ? (
        <span className="text-right max-sm:col-start-2 sm:w-20">
          <FactButton
            label={`Record: ${item.title}`}
            intent={{
              kind: 'happened',
              step: item.step,
              instance: item.instance,
              ...(isPart && { obligation: item.obligation }),
            }}
          >
            Record
          </FactButton>
        </span>
      ) : (
        <span className="max-sm:hidden sm:w-20" />
      )}
    </li>
  )
}

function clockHref(view: ApplicationView, item: ItemView): string {
  const key = clockKey({ ...item, obligation: '' })
  return `${routes.application(view.id, 'clocks', { open: key })}#clock-${key}`
}

function Consequence({ item }: { item: ItemView }) {
  if (item.obligation !== '' || item.standing.state !== 'missed') return null
  const { say, first } = item.consequence
  return (
    <p className="text-late mt-0.5 text-sm font-medium">
      {say} {first}
    </p>
  )
}

function Left({ item, todayOn, isDone }: { item: ItemView; todayOn: string; isDone: boolean }) {
  const tone = leftTone(item)
  if (isDone)
    return (
      <span className="text-copper font-medium">
        {item.status === 'waived' ? 'waived' : 'done'}
      </span>
    )
  if (item.startBy && showsStart(item, todayOn))
    return <LeftFigure tone="soon">start by {formatShortDate(item.startBy, todayOn)}</LeftFigure>
  if (tone === null) return <span className="text-ink-2">{item.standing.left}</span>
  return <LeftFigure tone={tone}>{leftWords(item)}</LeftFigure>
}

/** A near part whose preparation must begin by a day: that day stands as its figure. */
function showsStart(item: ItemView, todayOn: string): boolean {
  const isPart = item.obligation !== '' && item.standing.tone === 'soon'
  return isPart && item.startBy !== null && item.startBy >= todayOn
}

/** Who holds it, by when, and what of it is there: the small print of a row. */
function underWords(item: ItemView, view: ApplicationView): string {
  const holder = isOurs(item) ? (item.owner?.name ?? item.ownerRole) : null
  const follower = isOurs(item) ? undefined : item.owner?.name
  const due = item.obligation === '' ? dueWords(item, view.todayOn) : null
  const money =
    item.moneyTargetMinor === null
      ? null
      : `${formatDollars(item.moneyHeldMinor ?? 0)} of ${formatDollars(item.moneyTargetMinor)} posted`
  return [
    capitalized(holder ?? whoseWords(item.party)),
    due && `due ${due}`,
    statedWords(item, view.todayOn),
    follower && `${follower} follows it`,
    money,
    item.startBy && item.status === 'open' && !showsStart(item, view.todayOn)
      ? `start by ${formatDate(item.startBy, view.todayOn)}`
      : null,
    item.acknowledged &&
      `in hand, ${item.acknowledged.by}: next ${formatDate(item.acknowledged.untilOn, view.todayOn)}`,
  ]
    .filter(Boolean)
    .join(' · ')
}

function statedWords(item: ItemView, todayOn: string): string | null {
  if (!item.statedDueOn || item.statedDueOn === item.dueOn || item.obligation !== '') return null
  if (!item.dueOn) return 'the date as they state it'
  const counted = formatDate(item.dueOn, todayOn)
  return `they say ${formatDate(item.statedDueOn, todayOn)}, our count ${counted}`
}

function capitalized(text: string): string {
  return `${text.slice(0, 1).toUpperCase()}${text.slice(1)}`
}
