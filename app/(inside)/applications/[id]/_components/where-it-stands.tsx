import type { ReactNode } from 'react'
import { FactButton } from '@/components/applications/fact-button'
import { formatDate } from '@/lib/domain/format-date'
import type { ApplicationView } from '@/lib/schemas/application'

interface WhereItStandsProps {
  view: ApplicationView
  mayRecord: boolean
}

/** A line above the drawing where the request is not simply under way: new, withdrawn or done. */
export function WhereItStands({ view, mayRecord }: WhereItStandsProps) {
  if (view.standing === 'preparing') return <Preparing view={view} mayRecord={mayRecord} />
  if (view.standing === 'withdrawn') return <Withdrawn view={view} mayRecord={mayRecord} />
  if (view.standing === 'filed' && view.terms.requestNo === undefined && mayRecord)
    return (
      <Line words="The utility assigns the request number after filing; none is recorded yet.">
        <FactButton intent={{ kind: 'changed', terms: ['requestNo'] }}>
          Record the request number
        </FactButton>
      </Line>
    )
  if (view.standing === 'in_operation')
    return <Line words="In operation. What is still open below is owed after that." />
  return null
}

function Line({ words, children }: { words: string; children?: ReactNode }) {
  return (
    <div className="border-ink mb-4 flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-l-4 py-1 pl-3.5">
      <p className="max-w-prose">{words}</p>
      {children}
    </div>
  )
}

function Preparing({ view, mayRecord }: WhereItStandsProps) {
  const first = view.items.find(
    (item) =>
      item.obligation === '' && item.onLine && item.status === 'open' && item.party === 'applicant',
  )
  const words = 'Not filed yet. The clocks of the procedure start with its filing.'
  if (!first || !mayRecord) return <Line words={words} />
  return (
    <Line words={words}>
      <FactButton
        look="primary"
        intent={{ kind: 'happened', step: first.step, instance: first.instance }}
      >
        Record its filing
      </FactButton>
    </Line>
  )
}

function Withdrawn({ view, mayRecord }: WhereItStandsProps) {
  const fact = view.facts.findLast((one) => one.kind === 'withdrawn')
  const on = fact?.receivedOn ?? fact?.sentOn
  return (
    <Line
      words={`Withdrawn${on ? ` ${formatDate(on, view.todayOn)}` : ''}. No clock runs; the line shows how far it came.`}
    >
      {mayRecord && <FactButton intent={{ kind: 'reinstated' }}>Reinstate the request</FactButton>}
    </Line>
  )
}
