'use client'

import { CheckboxField } from '@/components/ui/choice-fields'
import type { EntryChoices } from '@/lib/schemas/entry'

interface ConcernFieldsProps {
  others: EntryChoices['others']
  chosen: readonly string[]
  onChange: (chosen: string[]) => void
}

/** Further requests that the same letter or call is about. */
export function ConcernFields({ others, chosen, onChange }: ConcernFieldsProps) {
  if (others.length === 0) return null
  const toggle = (id: string, isOn: boolean) =>
    onChange(isOn ? [...chosen, id] : chosen.filter((one) => one !== id))
  const count = chosen.length
  return (
    <details className="border-rule-2 border-b py-2.5" open={count > 0 || undefined}>
      <summary className="font-medium pointer-coarse:min-h-11 pointer-coarse:py-2.5">
        Also concerns other requests{count > 0 && `: ${count}`}
      </summary>
      <div className="grid gap-x-6 pt-1 sm:grid-cols-2">
        {others.map(({ id, projectName, operator }) => (
          <CheckboxField
            key={id}
            name={`concerns-${id}`}
            label={
              <>
                {projectName} <span className="cap">{operator}</span>
              </>
            }
            checked={chosen.includes(id)}
            onChange={(event) => toggle(id, event.target.checked)}
          />
        ))}
      </div>
    </details>
  )
}
