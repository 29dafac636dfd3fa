'use client'

import type { PlantFormProps } from '@/components/design/plant-form'
import { CheckboxField } from '@/components/ui/choice-fields'
import { SelectField } from '@/components/ui/text-fields'
import type { DesignBody } from '@/lib/schemas/design'

type Models = DesignBody['models']

const cellTemperatures: Record<Models['cellTemperature']['model'], Models['cellTemperature']> = {
  faiman: { model: 'faiman', u0: 25, u1: 6.84 },
  sapm: { model: 'sapm', a: -3.56, b: -0.075, deltaT: 3 },
}

/** Which published models the chain runs with. */
export function ModelFields({ draft, onChoose }: PlantFormProps) {
  const { models, mounting } = draft.body
  const disabled = !onChoose
  return (
    <>
      {mounting.kind === 'single_axis_tracker' && (
        <CheckboxField
          name="mounting.backtrack"
          label="Backtracking"
          checked={mounting.backtrack}
          disabled={disabled}
          onChange={({ target }) => onChoose?.('mounting.backtrack', target.checked)}
        />
      )}
      <SelectField
        name="models.transposition"
        label="Sky diffuse"
        value={models.transposition}
        disabled={disabled}
        options={[
          { value: 'perez_1990', label: 'Perez (1990)' },
          { value: 'hay_davies_1980', label: 'Hay and Davies (1980)' },
          { value: 'isotropic', label: 'Isotropic' },
        ]}
        onChange={({ target }) => onChoose?.('models.transposition', target.value)}
      />
      <SelectField
        name="models.incidence"
        label="Incidence loss"
        value={models.incidence}
        disabled={disabled}
        options={[
          { value: 'ashrae', label: 'ASHRAE' },
          { value: 'physical', label: 'Glass cover' },
          { value: 'none', label: 'None' },
        ]}
        onChange={({ target }) => onChoose?.('models.incidence', target.value)}
      />
      <SelectField
        name="models.cellTemperature"
        label="Cell temperature"
        value={models.cellTemperature.model}
        disabled={disabled}
        options={[
          { value: 'faiman', label: 'Faiman (2008)' },
          { value: 'sapm', label: 'Sandia (2004), open rack' },
        ]}
        onChange={({ target }) =>
          onChoose?.(
            'models.cellTemperature',
            cellTemperatures[target.value as Models['cellTemperature']['model']],
          )
        }
      />
    </>
  )
}
