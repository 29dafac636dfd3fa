'use client'

import { useState } from 'react'
import { factWords } from '@/components/applications/fact-words'
import { Button } from '@/components/ui/button'
import type { ProblemError } from '@/lib/client/fetcher'
import { routes } from '@/lib/routes'
import type { ApplicationView } from '@/lib/schemas/application'

interface FactRefusalProps {
  problem?: ProblemError
  view: ApplicationView
  /** The sequence the form sends: facts after it were recorded meanwhile. */
  seenSeq: number
  onLoad: () => Promise<void>
}

/** Why a form was refused as a whole, what was kept, and what to do. */
export function FactRefusal({ problem, view, seenSeq, onLoad }: FactRefusalProps) {
  if (!problem) return null
  return (
    <div role="alert" className="border-late bg-late-2 my-3 border-l-4 px-3.5 py-2.5 text-sm">
      <p className="text-late font-semibold">{headline(problem)}</p>
      {problem.status === 409 ? (
        <Meanwhile problem={problem} view={view} seenSeq={seenSeq} onLoad={onLoad} />
      ) : (
        <p className="mt-1">{problem.detail ?? problem.message}</p>
      )}
      {problem.status === 401 && <SignInAgain />}
    </div>
  )
}

function headline(problem: ProblemError): string {
  if (problem.status === 401) return 'Your session has ended. What you typed is kept here.'
  if (problem.status === 403) return 'Your roles do not allow this.'
  if (problem.status === 409) return 'Nothing was saved: the application has moved on.'
  return problem.title
}

function SignInAgain() {
  return (
    <p className="mt-1.5">
      <a
        href={routes.signIn()}
        target="_blank"
        rel="noopener"
        className="font-semibold underline underline-offset-2"
      >
        Sign in in another tab
      </a>
      , come back to this one and press again.
    </p>
  )
}

interface MeanwhileProps extends FactRefusalProps {
  problem: ProblemError
}

/** What was recorded since the form was opened; once that is loaded, the form can be sent again. */
function Meanwhile({ problem, view, seenSeq, onLoad }: MeanwhileProps) {
  const [wasLoaded, setLoaded] = useState(false)
  const newer = view.facts.filter((fact) => fact.seq > seenSeq)
  const ground = { zone: view.operator.zone, facts: view.facts, items: view.items }
  if (wasLoaded && newer.length === 0)
    return <p className="mt-1">The new state is loaded. Look it over, then press again.</p>
  if (newer.length === 0) return <p className="mt-1">{problem.detail ?? problem.message}</p>
  return (
    <>
      <p className="mt-1">Recorded since this form was opened:</p>
      <ul className="mt-1 grid list-disc gap-0.5 pl-5">
        {newer.map((fact) => (
          <li key={fact.id}>
            {factWords(fact, ground).title}, {fact.recordedBy ?? 'by a job'}
          </li>
        ))}
      </ul>
      <p className="mt-1">Yours was not saved and stays in the form.</p>
      <Button
        className="mt-2.5"
        onClick={() => onLoad().then(() => setLoaded(true))}
        busyLabel="Loading"
      >
        Load the new state
      </Button>
    </>
  )
}
