import { clsx } from 'clsx'
import { FactButton } from '@/components/applications/fact-button'
import { factWords } from '@/components/applications/fact-words'
import { formatInstant } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import type { ApplicationView, FactView } from '@/lib/schemas/application'

interface FactListProps {
  view: ApplicationView
  /** Zone of the person reading, in which the moment of recording is shown. */
  readerZone: string
  mayCorrect: boolean
}

/** The record, newest first; what was corrected stays, struck through, with what replaced it. */
export function FactList({ view, readerZone, mayCorrect }: FactListProps) {
  const newestFirst = [...view.facts].reverse()
  return (
    <section aria-labelledby="record">
      <h2 id="record" className="border-ink border-b-[1.5px] pb-2">
        {view.facts.length === 1 ? 'One fact' : `${view.facts.length} facts`}, newest first
      </h2>
      <ol reversed>
        {newestFirst.map((fact) => (
          <FactRow
            key={fact.id}
            fact={fact}
            view={view}
            readerZone={readerZone}
            mayCorrect={mayCorrect}
          />
        ))}
      </ol>
    </section>
  )
}

function FactRow({ fact, view, readerZone, mayCorrect }: FactListProps & { fact: FactView }) {
  const words = factWords(fact, {
    zone: view.operator.zone,
    facts: view.facts,
    items: view.items,
  })
  const isReplaced = fact.replacedById !== null
  return (
    <li
      id={`fact-${fact.seq}`}
      className="border-rule target:bg-sheet grid scroll-mt-6 gap-x-6 gap-y-1 border-b py-3 sm:grid-cols-[2.5rem_minmax(0,1fr)_auto]"
    >
      <span className="mono text-ink-2">{fact.seq}</span>
      <div className="min-w-0">
        <p className={clsx('font-semibold', isReplaced && 'text-ink-2 line-through')}>
          {words.title}
        </p>
        {words.details.length > 0 && (
          <p className={clsx('text-sm', isReplaced && 'text-ink-2 line-through')}>
            {words.details.join(' · ')}
          </p>
        )}
        <Replacement fact={fact} facts={view.facts} />
        <Evidence fact={fact} view={view} />
        <p className="cap mt-1">
          Recorded by {fact.recordedBy ?? 'a job'}, {formatInstant(fact.recordedAt, readerZone)}
        </p>
      </div>
      {mayCorrect && !isReplaced && fact.kind !== 'retraction' && (
        <Presses fact={fact} title={words.title} />
      )}
    </li>
  )
}

/* The first fact of a request holds its terms and pins its procedure: corrected by a change of terms. */
function Presses({ fact, title }: { fact: FactView; title: string }) {
  const isOrigin = fact.body.procedureRevisionId !== undefined
  if (isOrigin) return null
  return (
    <span className="flex gap-2 self-start">
      <FactButton
        look="quiet"
        label={`Correct: ${title}`}
        intent={{ kind: 'correction', replaces: fact.id }}
      >
        Correct
      </FactButton>
      <FactButton
        look="quiet"
        label={`Retract: ${title}`}
        intent={{ kind: 'retraction', replaces: fact.id }}
      >
        Retract
      </FactButton>
    </span>
  )
}

function Replacement({ fact, facts }: { fact: FactView; facts: readonly FactView[] }) {
  const by = facts.find((one) => one.id === fact.replacedById)
  const replaced = facts.find((one) => one.id === fact.replacesId)
  return (
    <>
      {by && (
        <p className="text-sm">
          {by.kind === 'retraction' ? 'Retracted by' : 'Corrected by'}{' '}
          <a href={`#fact-${by.seq}`}>fact {by.seq}</a>
          {by.reason && `: ${by.reason}`}
        </p>
      )}
      {replaced && (
        <p className="text-sm">
          {fact.kind === 'retraction' ? 'Retracts' : 'Corrects'}{' '}
          <a href={`#fact-${replaced.seq}`}>fact {replaced.seq}</a>
          {fact.reason && `: ${fact.reason}`}
        </p>
      )}
      {!replaced && fact.reason && <p className="text-sm">Reason: {fact.reason}</p>}
    </>
  )
}

function Evidence({ fact, view }: { fact: FactView; view: ApplicationView }) {
  const entries = fact.evidence.filter((one) => one.entryId !== null)
  const files = fact.evidence.length - entries.length
  if (fact.evidence.length === 0) return null
  const href = routes.application(view.id, 'correspondence')
  return (
    <p className="text-sm">
      Evidence:{' '}
      {entries.map((one, index) => (
        <span key={one.entryId}>
          {index > 0 && ', '}
          <a href={`${href}#entry-${one.entryId}`}>{one.entrySubject ?? 'correspondence'}</a>
        </span>
      ))}
      {files > 0 &&
        `${entries.length > 0 ? ' with ' : ''}${files === 1 ? 'a file' : `${files} files`}`}
    </p>
  )
}
