'use client'

import type { ReactNode } from 'react'
import {
  inverterFields,
  lossField,
  moduleFields,
  plantFields,
  siteFields,
  transformerFields,
  type DesignFieldSpec,
} from '@/components/design/design-fields'
import { textOf, type DesignDraft } from '@/components/design/design-draft'
import { ModelFields } from '@/components/design/model-fields'
import { PlantField } from '@/components/design/plant-field'
import { SelectField } from '@/components/ui/text-fields'
import type { DesignCheck } from '@/lib/domain/plant/design-checks'
import { dcKwOf, dcLossFractionOf } from '@/lib/domain/plant/design'
import type { DesignBody } from '@/lib/schemas/design'

export interface PlantFormProps {
  draft: DesignDraft
  errors: Readonly<Record<string, string>>
  checks: readonly DesignCheck[]
  /** Left out where the design is only shown. */
  onType?: (field: DesignFieldSpec, text: string) => void
  onChoose?: (path: string, value: unknown) => void
}

const mountings: Record<DesignBody['mounting']['kind'], DesignBody['mounting']> = {
  single_axis_tracker: {
    kind: 'single_axis_tracker',
    axisAzimuthDeg: 180,
    maxRotationDeg: 60,
    groundCoverRatio: 0.35,
    backtrack: true,
  },
  fixed: { kind: 'fixed', tiltDeg: 25, azimuthDeg: 180 },
}

/** The plant as it is designed; the checks stand under the field they concern. */
export function PlantForm(props: PlantFormProps) {
  const { body } = props.draft
  const isTracker = body.mounting.kind === 'single_axis_tracker'
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] [&_.field-note]:col-span-2 [&_.field-note]:col-start-1 [&_.field:not(.field-stacked)]:grid-cols-[minmax(0,1fr)_9.75rem]">
      <Output label="Array, STC" unit="MWdc" value={number(dcKwOf(body) / 1000)} />
      <Fields {...props} fields={plantFields.strings} />
      <Fields {...props} fields={plantFields.inverters} />
      <Fields {...props} fields={plantFields.poi} />
      <SelectField
        label="Mounting"
        name="mounting.kind"
        value={body.mounting.kind}
        disabled={!props.onChoose}
        options={[
          { value: 'single_axis_tracker', label: 'Single-axis tracker' },
          { value: 'fixed', label: 'Fixed tilt' },
        ]}
        onChange={({ target }) =>
          props.onChoose?.('mounting', mountings[target.value as DesignBody['mounting']['kind']])
        }
      />
      <Fields {...props} fields={isTracker ? plantFields.tracker : plantFields.fixed} />
      <Fields {...props} fields={plantFields.losses} />
      <Output
        label="DC losses together"
        unit="%"
        value={number(100 * dcLossFractionOf(body.dcLosses), 1)}
      />
      <Group title="DC losses by name" props={props} prefixes={['dcLosses']}>
        <Fields {...props} fields={body.dcLosses.map((loss, i) => lossField(i, loss.name))} />
      </Group>
      <Group title={`Module: ${body.module.name}`} props={props} prefixes={['module']}>
        <Fields {...props} fields={moduleFields} />
        <Practice />
      </Group>
      <Group title={`Inverter: ${body.inverter.name}`} props={props} prefixes={['inverter']}>
        <Fields {...props} fields={inverterFields} />
        <Practice />
      </Group>
      <Group title="Transformers, from the POI inward" props={props} prefixes={['transformers']}>
        {body.transformers.map((_, index) => (
          <Fields key={index} {...props} fields={transformerFields(index)} />
        ))}
        <Practice />
      </Group>
      <Group
        title="Site and models"
        props={props}
        prefixes={['site', 'albedo', 'limitKeptBy', 'models']}
      >
        <Fields {...props} fields={siteFields} />
        <ModelFields {...props} />
      </Group>
    </div>
  )
}

const none: readonly DesignCheck[] = []

function Fields({
  fields,
  draft,
  errors,
  checks,
  onType,
}: PlantFormProps & { fields: readonly DesignFieldSpec[] }) {
  return fields.map((field) => {
    const own = checks.filter((check) => check.path === field.path)
    return (
      <PlantField
        key={field.path}
        field={field}
        text={textOf(draft, field)}
        error={errors[field.path]}
        checks={own.length > 0 ? own : none}
        onType={onType}
      />
    )
  })
}

interface GroupProps {
  title: string
  props: PlantFormProps
  /** Paths whose faults and unusual figures are told beside the title while it is closed. */
  prefixes: readonly string[]
  children: ReactNode
}

function Group({ title, props, prefixes, children }: GroupProps) {
  const within = (path: string) => prefixes.some((one) => path.split('.')[0] === one)
  const shownAbove = new Set(
    Object.values(plantFields).flatMap((fields) => fields.map((field) => field.path)),
  )
  const faults = Object.keys(props.errors).filter((path) => within(path) && !shownAbove.has(path))
  const unusual = props.checks.filter(
    (check) => within(check.path) && !shownAbove.has(check.path) && check.tone !== 'kept',
  )
  const words =
    faults.length > 0
      ? `${faults.length} to mend`
      : unusual.length > 0
        ? `${unusual.length} unusual`
        : undefined
  return (
    <details className="border-rule-2 border-b py-2">
      <summary className="font-medium">
        {title}
        {words && <span className="text-soon ml-2 text-sm">{words}</span>}
      </summary>
      <div className="mt-1 pl-3">{children}</div>
    </details>
  )
}

function Practice() {
  return <p className="cap py-2">Ranges under these fields are common practice, not a standard.</p>
}

function Output({ label, unit, value }: { label: string; unit: string; value: string }) {
  return (
    <div className="field">
      <span className="font-medium">{label}</span>
      <div className="field-control">
        <output className="mono w-full max-w-24 px-2.5 py-1.5 text-right">{value}</output>
        <span className="cap field-unit">{unit}</span>
      </div>
    </div>
  )
}

function number(value: number, digits = 2): string {
  return Number.isFinite(value)
    ? value.toLocaleString('en-US', {
        minimumFractionDigits: digits,
        maximumFractionDigits: digits,
      })
    : '–'
}
