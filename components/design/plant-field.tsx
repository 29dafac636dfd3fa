'use client'

import { memo } from 'react'
import type { DesignFieldSpec } from '@/components/design/design-fields'
import { NumberField, TextField } from '@/components/ui/text-fields'
import { StateWord } from '@/components/ui/state-word'
import type { DesignCheck } from '@/lib/domain/plant/design-checks'

interface PlantFieldProps {
  field: DesignFieldSpec
  text: string
  error?: string
  checks?: readonly DesignCheck[]
  /** Left out where the design is only shown. */
  onType?: (field: DesignFieldSpec, text: string) => void
}

/** One quantity of the plant, with what its checks say below it. Up and down move its last digit. */
export const PlantField = memo(function PlantField(props: PlantFieldProps) {
  const { field, text, error, checks = [], onType } = props
  const shared = {
    name: field.path,
    label: field.label,
    unit: field.unit ?? ' ',
    value: text,
    error,
    readOnly: !onType,
    check:
      checks.length > 0 ? { tone: 'plain' as const, text: <Checks checks={checks} /> } : undefined,
    onChange: (event: { target: { value: string } }) => onType?.(field, event.target.value),
  }
  if (field.isText) return <TextField {...shared} unit={undefined} stacked />
  return (
    <NumberField
      {...shared}
      controlClass="max-w-24"
      onKeyDown={(event) => {
        const direction = { ArrowUp: 1, ArrowDown: -1 }[event.key]
        if (!direction || !onType) return
        event.preventDefault()
        onType(field, stepped(text, direction))
      }}
    />
  )
})

const tones = { kept: 'far', broken: 'missed', unusual: 'soon' } as const

function Checks({ checks }: { checks: readonly DesignCheck[] }) {
  return checks.map(({ text, tone }) => (
    <span key={text} className="block">
      <StateWord tone={tones[tone]}>{text}</StateWord>
    </span>
  ))
}

/** The text with its last digit one up or down: `0.95` to `0.96`; unchanged where it is no number. */
export function stepped(text: string, direction: number): string {
  const plain = text.replaceAll(',', '').replaceAll('−', '-').trim()
  if (plain === '' || Number.isNaN(Number(plain))) return text
  const digits = plain.split('.')[1]?.length ?? 0
  const next = Number(plain) + direction * 10 ** -digits
  const shown = Math.abs(next).toLocaleString('en-US', {
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
  })
  return next < 0 && Number(shown.replaceAll(',', '')) !== 0 ? `−${shown}` : shown
}
