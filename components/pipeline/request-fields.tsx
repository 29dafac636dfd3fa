'use client'

import type { DraftFieldsProps } from '@/components/pipeline/new-application-form'
import { technologies } from '@/components/pipeline/new-application-draft'
import { fastTrackHint, ratioHint } from '@/components/pipeline/size-checks'
import { CheckboxField } from '@/components/ui/choice-fields'
import { NumberField, SelectField, TextField } from '@/components/ui/text-fields'

/** What is asked for: where, at which voltage, how large. */
export function RequestFields({ draft, change, choices, errorOf }: DraftFieldsProps) {
  const procedure = choices.procedures.find(
    ({ revisionId }) => revisionId === draft.procedureRevisionId,
  )
  const limit = fastTrackHint(procedure?.key, draft)
  const ratio = ratioHint(draft)
  return (
    <section>
      <h2 className="border-ink mt-8 border-b pb-1.5">Request</h2>
      <TextField
        label="Point of interconnection"
        name="terms.poi"
        autoComplete="off"
        placeholder="Feeder, bus or line"
        value={draft.poi}
        onChange={({ target }) => change({ poi: target.value })}
        error={errorOf('terms.poi')}
      />
      <NumberField
        label="Voltage at the POI"
        name="terms.poiVoltageKv"
        unit="kV"
        optional
        value={draft.poiVoltageKv}
        onChange={({ target }) => change({ poiVoltageKv: target.value })}
        error={errorOf('terms.poiVoltageKv')}
      />
      <div className="border-rule-2 border-b sm:pl-[calc(13rem+10px)]">
        <CheckboxField
          label="On a mainline, within 2.5 circuit miles of the substation"
          name="terms.onMainline"
          checked={draft.onMainline}
          onChange={({ target }) => change({ onMainline: target.checked })}
        />
      </div>
      <NumberField
        label="At the POI"
        name="terms.requestedMw"
        unit="MWac"
        check={limit ? { tone: 'soon', text: limit } : undefined}
        value={draft.requestedMw}
        onChange={({ target }) => change({ requestedMw: target.value })}
        error={errorOf('terms.requestedMw')}
      />
      <NumberField
        label="Array"
        name="terms.dcMw"
        unit="MWdc"
        optional
        check={ratio ? { tone: 'plain', text: ratio } : undefined}
        value={draft.dcMw}
        onChange={({ target }) => change({ dcMw: target.value })}
        error={errorOf('terms.dcMw')}
      />
      <SelectField
        label="Technology"
        name="terms.technology"
        options={technologies.map((name) => ({ value: name, label: name }))}
        value={draft.technology}
        onChange={({ target }) => change({ technology: target.value })}
        error={errorOf('terms.technology')}
      />
    </section>
  )
}
