'use client'

import { draftOf } from '@/components/design/design-draft'
import { PlantForm } from '@/components/design/plant-form'
import { YearSheet } from '@/components/design/year-sheet'
import { YearTitle } from '@/components/design/year-title'
import { checksOf } from '@/lib/domain/plant/design-checks'
import type { Calculation } from '@/lib/schemas/design'

interface FrozenSheetProps {
  calculation: Calculation
  projectName: string
  /** When it was frozen, in words. */
  frozen: string
}

/** A frozen calculation: the plant and the figures as they were kept, nothing to move. */
export function FrozenSheet({ calculation, projectName, frozen }: FrozenSheetProps) {
  const { no, inputs, result, recordedBy, sha256, engineVersion } = calculation
  const { design, designNo, weather } = inputs
  return (
    <>
      <YearTitle
        name={`${projectName}, no. ${no}`}
        note={`frozen ${frozen} by ${recordedBy ?? 'the product'}`}
        year={result}
        weather={{ name: weather.name, synthetic: result.weather.kind === 'synthetic' }}
      />
      <YearSheet
        shown={{ year: result, design }}
        waiting={null}
        plant={<PlantForm draft={draftOf(design)} errors={{}} checks={checksOf(design)} />}
      />
      <section className="mt-8">
        <h2 className="text-[1.0625rem]">How it was worked out</h2>
        <p className="text-ink-2 mt-1">
          Design revision {designNo}, {weather.name}, engine {engineVersion}. SHA-256 of inputs and
          figures: <span className="mono break-all">{sha256}</span>
        </p>
        <dl className="mt-2">
          {result.methods.map(({ step, method, source }) => (
            <div
              key={step}
              className="border-rule-2 grid gap-x-6 border-b py-1.5 sm:grid-cols-[16rem_1fr_1fr]"
            >
              <dt className="text-ink-2">{step}</dt>
              <dd>{method}</dd>
              <dd className="text-ink-2">{source}</dd>
            </div>
          ))}
        </dl>
      </section>
    </>
  )
}
