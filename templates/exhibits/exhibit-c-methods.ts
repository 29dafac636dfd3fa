import type { ExhibitSource } from '@/lib/domain/exhibits'
import { formatShortDate } from '@/lib/domain/format-date'
import { trimmed } from '@/lib/domain/one-line-of-design'
import type { Design } from '@/lib/domain/plant/design'
import type { ContentRow } from '@/templates/exhibits/exhibit-c-content'

/** Every step of the chain with its method, its constants and its publication. */
export function methodRows({ design, result }: ExhibitSource): ContentRow[] {
  return result.methods.map(({ step, method, source }) => {
    const constants = constantsOf(step, design)
    return {
      label: step,
      value: constants ? `${method}; ${constants}` : method,
      note: unbroken(source),
    }
  })
}

/** Which frozen calculation the figures are, with the whole hash of its inputs and result. */
export function calculationWords({ data }: ExhibitSource): string {
  const { calculation, design } = data
  return `Frozen on ${formatShortDate(calculation.recordedOn)} as calculation no. ${calculation.no} of design revision ${design.no} of ${formatShortDate(design.recordedOn)}, engine ${calculation.engineVersion}. SHA-256 of inputs and result: ${calculation.sha256}`
}

/** Report numbers stay on one line. */
function unbroken(source: string): string {
  return source.replace(/\b(?:NREL\/TP|SAND)[\w-]+/g, (no) => no.replaceAll('-', '\u2011'))
}

/** The constants of the step that the design sets. */
function constantsOf(step: string, design: Design): string {
  const { module, inverter, models, mounting } = design
  switch (step) {
    case 'Cell temperature':
      return cellConstants(models.cellTemperature)
    case 'DC power':
      return `${trimmed(module.gammaPmaxPctPerC, 2).replace('-', '−')} % per °C`
    case 'Inverter':
      return `nominal efficiency ${trimmed(inverter.efficiency * 100)} %`
    case 'Tracker rotation':
      return mounting.kind === 'single_axis_tracker'
        ? `±${trimmed(mounting.maxRotationDeg)}°, ground cover ratio ${trimmed(mounting.groundCoverRatio, 2)}`
        : ''
    default:
      return ''
  }
}

function cellConstants(model: Design['models']['cellTemperature']): string {
  return model.model === 'faiman'
    ? `u0 ${trimmed(model.u0)}, u1 ${trimmed(model.u1)}`
    : `a ${trimmed(model.a)}, b ${trimmed(model.b)}, ΔT ${trimmed(model.deltaT)}`.replaceAll(
        '-',
        '−',
      )
}
