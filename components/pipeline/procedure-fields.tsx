'use client'

import type { DraftFieldsProps } from '@/components/pipeline/new-application-form'
import { proceduresFor } from '@/components/pipeline/new-application-draft'
import { RadioField } from '@/components/ui/choice-fields'
import { SelectField } from '@/components/ui/text-fields'
import type { ApplicationChoices } from '@/lib/schemas/application'

/** Whom the request goes to, and by which of the procedures it can follow. */
export function ProcedureFields({ draft, change, choices, errorOf }: DraftFieldsProps) {
  const fitting = proceduresFor(draft.operatorId, choices.procedures)
  return (
    <section>
      <h2 className="border-ink mt-8 border-b pb-1.5">Organization and procedure</h2>
      <SelectField
        label="Organization"
        name="operatorId"
        emptyLabel="Choose the organization"
        options={choices.organizations.map(({ id, name }) => ({ value: id, label: name }))}
        hint={
          choices.organizations.length === 0
            ? 'No organization is kept yet. An administrator adds the first one.'
            : undefined
        }
        value={draft.operatorId}
        onChange={({ target }) => change({ operatorId: target.value })}
        error={errorOf('operatorId')}
      />
      {draft.operatorId && (
        <RadioField
          label="Procedure"
          name="procedureRevisionId"
          options={fitting.map((one) => ({
            value: one.revisionId,
            label: one.title,
            detail: detailOf(one),
          }))}
          hint={
            fitting.length === 0
              ? 'No procedure fits this organization. An administrator publishes one.'
              : 'The application keeps this revision until you move it to a later one.'
          }
          value={draft.procedureRevisionId}
          onChange={({ target }) => change({ procedureRevisionId: target.value })}
          error={errorOf('procedureRevisionId')}
        />
      )}
    </section>
  )
}

function detailOf(one: ApplicationChoices['procedures'][number]): string {
  const whose = one.organizationId === null ? 'library' : 'their own'
  return `Revision ${one.no} · ${one.steps} steps · ${whose}`
}
