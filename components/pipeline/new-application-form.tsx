'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import {
  type ApplicationDraft,
  checkDraft,
  emptyDraft,
  proceduresFor,
} from '@/components/pipeline/new-application-draft'
import { ProcedureFields } from '@/components/pipeline/procedure-fields'
import { ProjectFields } from '@/components/pipeline/project-fields'
import { RequestFields } from '@/components/pipeline/request-fields'
import { FormMessage } from '@/components/sign-in/form-message'
import { Button } from '@/components/ui/button'
import { ErrorSummary } from '@/components/ui/error-summary'
import { LinkButton } from '@/components/ui/link-button'
import { ProblemError } from '@/lib/client/fetcher'
import { newId } from '@/lib/client/new-id'
import { createApplication } from '@/lib/client/pipeline'
import { useFormCall } from '@/lib/client/use-form-call'
import { routes } from '@/lib/routes'
import type { ApplicationChoices } from '@/lib/schemas/application'

/** What each part of the form gets: the draft, how to change it, and the faults at its fields. */
export interface DraftFieldsProps {
  draft: ApplicationDraft
  change: (part: Partial<ApplicationDraft>) => void
  choices: ApplicationChoices
  errorOf: (path: string) => string | undefined
}

/** Starts an application on one page; what was typed stays after a refusal. */
export function NewApplicationForm({ choices }: { choices: ApplicationChoices }) {
  // One id for the form: sent twice it is the same application.
  const [id] = useState(newId)
  const [draft, setDraft] = useState(emptyDraft)
  const [isAnswered, setAnswered] = useState(false)
  const router = useRouter()

  async function send() {
    const { input, faults } = checkDraft(id, draft, choices.projects)
    setAnswered(input !== null)
    if (!input) throw new ProblemError(422, 'invalid', 'Some fields need another look', faults)
    const started = await createApplication(input)
    router.push(routes.application(started.id))
  }

  const { onSubmit, busy, problem, fields, errorOf } = useFormCall(send)
  const change = (part: Partial<ApplicationDraft>) =>
    setDraft((before) => withFittingProcedure({ ...before, ...part }, choices))
  const stillWrong = isAnswered ? fields : checkDraft(id, draft, choices.projects).faults
  // A fault goes as soon as its field is right; what the server refused stays until it is sent again.
  const openErrorOf = (path: string) =>
    stillWrong.some((fault) => fault.path === path) ? errorOf(path) : undefined
  const parts = { draft, change, choices, errorOf: openErrorOf }
  return (
    <form method="post" noValidate onSubmit={onSubmit} className="max-w-3xl">
      <ErrorSummary errors={fields} />
      {problem && (
        <FormMessage tone="refused">{problem.message} What you typed is kept.</FormMessage>
      )}
      <ProjectFields {...parts} />
      <ProcedureFields {...parts} />
      <RequestFields {...parts} />
      <div className="mt-6 flex flex-wrap justify-end gap-2.5">
        <LinkButton href={routes.pipeline()}>Back to the pipeline</LinkButton>
        <Button type="submit" look="primary" busy={busy} busyLabel="Starting">
          Start the application
        </Button>
      </div>
    </form>
  )
}

/** A procedure of another organization is let go; the only one there is, is taken. */
function withFittingProcedure(
  draft: ApplicationDraft,
  { procedures }: ApplicationChoices,
): ApplicationDraft {
  const fitting = proceduresFor(draft.operatorId, procedures)
  if (fitting.some(({ revisionId }) => revisionId === draft.procedureRevisionId)) return draft
  const only = fitting.length === 1 ? fitting[0]!.revisionId : ''
  return { ...draft, procedureRevisionId: only }
}
