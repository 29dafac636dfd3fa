import type { ReactNode } from 'react'
import { AcknowledgeButton } from '@/app/(inside)/applications/[id]/clocks/_components/acknowledge-button'
import {
  AssignMenu,
  type Holder,
} from '@/app/(inside)/applications/[id]/clocks/_components/assign-menu'
import {
  ClockActions,
  type ClockMay,
} from '@/app/(inside)/applications/[id]/clocks/_components/clock-actions'
import { Derivation } from '@/app/(inside)/applications/[id]/clocks/_components/derivation'
import { dueWords, isOurs, stateWords } from '@/components/applications/clock-words'
import { factWords } from '@/components/applications/fact-words'
import { formatDollars } from '@/components/applications/money-words'
import { workingDueOf } from '@/components/line/line-of-items'
import { StateWord } from '@/components/ui/state-word'
import { formatDate } from '@/lib/domain/format-date'
import { nextDateRange } from '@/lib/domain/obligations'
import { routes } from '@/lib/routes'
import type { ApplicationView, ItemView } from '@/lib/schemas/application'

interface ClockDetailProps {
  item: ItemView
  view: ApplicationView
  may: ClockMay
  people: readonly Holder[]
}

/** One clock opened: how it was counted, what missing it costs, who holds it, what can be done. */
export function ClockDetail({ item, view, may, people }: ClockDetailProps) {
  return (
    <div className="grid gap-x-12 gap-y-6 font-normal lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
      <Derivation item={item} view={view} />
      <div className="grid content-start gap-5">
        <Part title="If it is missed">
          <p>{item.consequence.say || 'The procedure names no consequence.'}</p>
          {item.consequence.first && <p>First: {item.consequence.first}</p>}
        </Part>
        <Parts item={item} view={view} may={may} people={people} />
        <Held item={item} view={view} may={may} people={people} />
        <Facts item={item} view={view} />
        <ClockActions item={item} view={view} may={may} />
      </div>
    </div>
  )
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section>
      <h3 className="border-rule mb-1.5 border-b pb-1">{title}</h3>
      {children}
    </section>
  )
}

function Parts({ item, view, may, people }: ClockDetailProps) {
  const parts = view.items.filter(
    (one) => one.obligation !== '' && one.step === item.step && one.instance === item.instance,
  )
  if (parts.length === 0) return null
  return (
    <Part title="Its parts">
      <ul className="grid gap-2">
        {parts.map((part) => (
          <li
            key={part.obligation}
            className="flex flex-wrap items-baseline justify-between gap-x-4"
          >
            <span>
              {part.title}
              <span className="cap block">{partWords(part, view.todayOn)}</span>
            </span>
            {may.assign && part.status === 'open' ? (
              <AssignMenu applicationId={view.id} item={part} people={people} />
            ) : (
              <StateWord tone={stateWords(part).tone}>{stateWords(part).text}</StateWord>
            )}
          </li>
        ))}
      </ul>
    </Part>
  )
}

function partWords(part: ItemView, todayOn: string): string {
  return [
    stateWords(part).text,
    part.owner?.name ?? part.ownerRole,
    part.startBy && part.status === 'open' && `start by ${formatDate(part.startBy, todayOn)}`,
    part.moneyTargetMinor !== null &&
      `${formatDollars(part.moneyHeldMinor ?? 0)} of ${formatDollars(part.moneyTargetMinor)}`,
  ]
    .filter(Boolean)
    .join(' · ')
}

function Held({ item, view, may, people }: ClockDetailProps) {
  const dueOn = workingDueOf(item)
  const isRunning = item.status === 'open' && dueOn !== null
  const { acknowledged } = item
  if (item.status !== 'open' && item.status !== 'waiting' && item.status !== 'stopped') return null
  return (
    <Part title={isOurs(item) ? 'Who holds it' : 'Who follows it'}>
      <div className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2">
        <span>
          {item.owner?.name ??
            (item.ownerRole ? `Nobody by name; ${item.ownerRole}` : 'Nobody by name')}
        </span>
        {may.assign && <AssignMenu applicationId={view.id} item={item} people={people} />}
      </div>
      {acknowledged && (
        <p className="mt-2">
          In hand since {acknowledged.by} said so: {acknowledged.reason}. Silent until{' '}
          {formatDate(acknowledged.untilOn, view.todayOn)}.
        </p>
      )}
      {may.acknowledge && isRunning && (
        <div className="mt-2">
          <AcknowledgeButton
            applicationId={view.id}
            item={item}
            dueOn={dueOn}
            dueWords={dueWords(item, view.todayOn) ?? ''}
            range={nextDateRange(dueOn, view.todayOn)}
          />
        </div>
      )}
    </Part>
  )
}

function Facts({ item, view }: Pick<ClockDetailProps, 'item' | 'view'>) {
  const facts = view.facts.filter(
    (fact) =>
      fact.step === item.step && fact.instance === item.instance && fact.replacedById === null,
  )
  if (facts.length === 0) return null
  const ground = { zone: view.operator.zone, facts: view.facts, items: view.items }
  return (
    <Part title="Recorded">
      <ul className="grid gap-1.5">
        {facts.map((fact) => {
          const words = factWords(fact, ground)
          return (
            <li key={fact.id}>
              <a href={`${routes.application(view.id, 'record')}#fact-${fact.seq}`}>
                {words.title}
              </a>
              <span className="cap block">{words.details.join(' · ')}</span>
            </li>
          )
        })}
      </ul>
    </Part>
  )
}
