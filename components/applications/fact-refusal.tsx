'use client'

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
      <p className="mt-1">{problem.detail ?? problem.message}</p>
      {problem.status === 401 && <SignInAgain />}
      {problem.status === 409 && <Meanwhile view={view} seenSeq={seenSeq} onLoad={onLoad} />}
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

function Meanwhile({ view, seenSeq, onLoad }: Omit<FactRefusalProps, 'problem'>) {
  const newer = view.facts.filter((fact) => fact.seq > seenSeq)
  const ground = { zone: view.operator.zone, facts: view.facts, items: view.items }
  return (
    <>
      {newer.length > 0 && (
        <ul className="mt-1.5 grid gap-0.5">
          {newer.map((fact) => (
            <li key={fact.id}>
              {fact.recordedBy ?? 'A job'}: {factWords(fact, ground).title}
            </li>
          ))}
        </ul>
      )}
      <Button className="mt-2.5" onClick={onLoad} busyLabel="Loading">
        Load the new state
      </Button>
    </>
  )
}
