'use client'

import { CheckboxField } from '@/components/ui/choice-fields'
import { DateField, SelectField, TextField, TimeField } from '@/components/ui/text-fields'
import { zoneName } from '@/lib/domain/format-date'
import type { EntryChoices } from '@/lib/schemas/entry'
import { newProof, type EntryDraft, type Proof } from './entry-draft'

interface ProofFieldsProps {
  draft: EntryDraft
  onChange: (proof: Proof | null) => void
  choices: EntryChoices
  errorOf: (path: string) => string | undefined
  /** The concerned further applications in which a step is open too. */
  openIn: (step: string) => readonly { id: string; projectName: string }[]
}

const valueOf = (step: { step: string; instance: number }) => `${step.step}#${step.instance}`

/** "This proves an event": the entry and the event are recorded with one press. */
export function ProofFields({ draft, onChange, choices, errorOf, openIn }: ProofFieldsProps) {
  const { proof } = draft
  const { steps, zone } = choices
  const chosen = proof ? steps.find((step) => valueOf(step) === valueOf(proof)) : undefined
  const set = (part: Partial<Proof>) => proof && onChange({ ...proof, ...part })
  const error = (name: string) => errorOf(`facts.0.${name}`)

  function choose(value: string) {
    const step = steps.find((one) => valueOf(one) === value)
    if (!step) return onChange(null)
    onChange({ ...newProof(draft, step), others: openIn(step.step).map(({ id }) => id) })
  }

  return (
    <fieldset>
      <legend className="pt-5 pb-1 text-lg font-semibold">This proves an event</legend>
      <SelectField
        name="facts.0.step"
        label="Event"
        hint={proof ? 'Recorded with this entry as its evidence.' : undefined}
        emptyLabel={steps.length > 0 ? 'None' : 'No step is open to record'}
        options={steps.map((step) => ({ value: valueOf(step), label: titleOf(step) }))}
        value={proof ? valueOf(proof) : ''}
        onChange={(event) => choose(event.target.value)}
        error={error('step') ?? errorOf('facts.0') ?? error('instance')}
        optional
      />
      {proof && (
        <>
          {chosen && chosen.outcomes.length > 0 && (
            <SelectField
              name="facts.0.outcome"
              label="Outcome"
              emptyLabel="Choose the outcome"
              options={chosen.outcomes.map(({ key, title }) => ({ value: key, label: title }))}
              value={proof.outcome}
              onChange={(event) => set({ outcome: event.target.value })}
              error={error('outcome')}
            />
          )}
          <DateField
            name="facts.0.sentOn"
            label="Sent on"
            value={proof.sentOn}
            onChange={(event) => set({ sentOn: event.target.value })}
            error={error('sentOn')}
            optional
          />
          <DateField
            name="facts.0.receivedOn"
            label="Received on"
            value={proof.receivedOn}
            onChange={(event) => set({ receivedOn: event.target.value })}
            error={error('receivedOn')}
            optional
          />
          <TimeField
            name="facts.0.receivedAt"
            label="Received at"
            unit={zoneName(zone, `${proof.receivedOn || draft.on || '2000-01-01'}T12:00:00Z`)}
            value={proof.receivedTime}
            onChange={(event) => set({ receivedTime: event.target.value })}
            error={error('receivedAt')}
            optional
          />
          {(proof.reason || error('reason')) && (
            <TextField
              name="facts.0.reason"
              label="Reason"
              value={proof.reason}
              onChange={(event) => set({ reason: event.target.value })}
              error={error('reason')}
            />
          )}
          {openIn(proof.step).map(({ id, projectName }) => (
            <CheckboxField
              key={id}
              name={`proof-${id}`}
              label={`Record it for ${projectName} too`}
              checked={proof.others.includes(id)}
              onChange={(event) =>
                set({
                  others: event.target.checked
                    ? [...proof.others, id]
                    : proof.others.filter((one) => one !== id),
                })
              }
            />
          ))}
        </>
      )}
    </fieldset>
  )
}

function titleOf(step: EntryChoices['steps'][number]): string {
  const round = step.instance > 1 ? `, round ${step.instance}` : ''
  return `${step.title}${round} (${step.party === 'applicant' ? 'ours' : 'theirs'})`
}
