import { FactButton } from '@/components/applications/fact-button'
import { factWords } from '@/components/applications/fact-words'
import { routes } from '@/lib/routes'
import type { ApplicationView } from '@/lib/schemas/application'

interface StrandedProps {
  view: ApplicationView
  mayCorrect: boolean
}

/** Facts that no longer fit the procedure as it stands: beside the line, never lost. */
export function Stranded({ view, mayCorrect }: StrandedProps) {
  const ground = { zone: view.operator.zone, facts: view.facts, items: view.items }
  const shown = view.stranded.flatMap(({ factId, reason }) => {
    const fact = view.facts.find((one) => one.id === factId)
    return fact ? [{ fact, reason }] : []
  })
  if (shown.length === 0) return null
  return (
    <section aria-labelledby="stranded" className="border-soon mt-5 border-l-4 pl-3.5">
      <h2 id="stranded">Recorded, but not on the line</h2>
      <ul className="mt-1 grid gap-2">
        {shown.map(({ fact, reason }) => (
          <li key={`${fact.id} ${reason}`} className="flex flex-wrap items-center gap-x-5 gap-y-1">
            <span>
              <a href={`${routes.application(view.id, 'record')}#fact-${fact.seq}`}>
                {factWords(fact, ground).title}
              </a>
              <span className="cap block">{reason}</span>
            </span>
            {mayCorrect && (
              <FactButton look="quiet" intent={{ kind: 'retraction', replaces: fact.id }}>
                Retract
              </FactButton>
            )}
          </li>
        ))}
      </ul>
    </section>
  )
}
