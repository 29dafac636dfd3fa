import {
  figuresOf,
  type Design,
  type DesignFigures,
  type DesignTransformer,
} from '@/lib/domain/plant/design'

/** `broken`: a limit is not kept; `unusual`: outside what is common practice, no standard. */
export interface DesignCheck {
  /** The field it concerns, as a path: `module.vocV`. */
  path: string
  tone: 'kept' | 'broken' | 'unusual'
  /** In words, with the figure and the limit. */
  text: string
}

/** A figure with thousands commas and a true minus sign. */
function shown(value: number, digits: number): string {
  const text = Math.abs(value).toLocaleString('en-US', {
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
  })
  return value < 0 ? `−${text}` : text
}

/**
 * What a design's figures say against its limits, and what in its data sheets is unusual. Voltage
 * and apparent power are limits; the ranges are common practice (engineering-facts.md section 5).
 */
export function checksOf(
  design: Design,
  figures: DesignFigures = figuresOf(design),
): DesignCheck[] {
  return [
    coldCheck(design, figures),
    hotCheck(design, figures),
    reactiveCheck(design, figures),
    ...ratioChecks(figures),
    ...moduleChecks(design),
    ...inverterChecks(design),
    ...design.transformers.flatMap((one, index) => transformerChecks(one, index, figures)),
  ]
}

const COUNTS = ['none', 'one', 'two', 'three', 'four', 'five']

function coldCheck({ modulesPerString, site, ...rest }: Design, { strings }: DesignFigures) {
  const limitV = Math.min(rest.module.maxSystemV, rest.inverter.maxDcV)
  const volts = `${shown(modulesPerString * strings.vocColdV, 1)} V of ${shown(limitV, 0)} V`
  const over = modulesPerString - strings.maxModules
  const excess = over > 0 ? `, ${COUNTS[over] ?? over} too many` : ''
  return {
    path: 'modulesPerString',
    tone: over > 0 ? 'broken' : 'kept',
    text: `${modulesPerString} in series at ${shown(site.tMinC, 0)} °C: ${volts}${excess}`,
  } satisfies DesignCheck
}

function hotCheck({ modulesPerString, site, inverter }: Design, { strings }: DesignFigures) {
  const volts = modulesPerString * strings.vmpHotV
  const kept = modulesPerString >= strings.minModules
  const rest = kept ? '' : `, at least ${strings.minModules} in series`
  return {
    path: 'modulesPerString',
    tone: kept ? 'kept' : 'broken',
    text: `Hottest cell ${shown(site.tCellHotC, 0)} °C: ${shown(volts, 1)} V, tracking from ${shown(inverter.mpptMinV, 0)} V${rest}`,
  } satisfies DesignCheck
}

function reactiveCheck(design: Design, { needed, inverterMva, spareMva }: DesignFigures) {
  const digits = inverterMva < 10 ? 2 : 1
  const short = spareMva < 0 ? `, ${shown(-spareMva, digits)} short` : ''
  const what = `${shown(needed.inverterKva / 1000, digits)} MVA needed for ${shown(design.exportLimitMw, 1)} MW at ${shown(design.powerFactorAtPoi, 2)}`
  return {
    path: 'inverter.count',
    tone: spareMva < 0 ? 'broken' : 'kept',
    text: `${what}: ${shown(inverterMva, digits)} installed${short}`,
  } satisfies DesignCheck
}

/** A check where a figure lies outside its usual range; none inside. */
function usual(
  path: string,
  name: string,
  value: number,
  [low, high]: readonly [number, number],
  { digits = 2, unit = '' }: { digits?: number; unit?: string } = {},
): DesignCheck[] {
  if (value >= low - 1e-9 && value <= high + 1e-9) return []
  const range = `${shown(low, digits)} to ${shown(high, digits)}${unit}`
  const text = `${name} ${shown(value, digits)}${unit}, usually ${range} (common practice)`
  return [{ path, tone: 'unusual', text }]
}

function ratioChecks({ dcPerPoi, dcPerInverter }: DesignFigures): DesignCheck[] {
  return [
    ...usual('exportLimitMw', 'Array over export limit', dcPerPoi, [1, 1.8]),
    ...usual('strings', 'Array over inverters', dcPerInverter, [1, 1.6]),
  ]
}

function moduleChecks({ module }: Design): DesignCheck[] {
  const { vocV, vmpV, iscA, impA, pmaxW, cellsInSeries } = module
  const perCell = vmpV / cellsInSeries
  const doubled = perCell >= 0.25 && perCell <= 0.32
  return [
    ...usual('module.pmaxW', 'Vmp times Imp over Pmax', (vmpV * impA) / pmaxW, [0.99, 1.01]),
    ...usual('module.vocV', 'Voc over Vmp', vocV / vmpV, [1.15, 1.33]),
    ...usual('module.iscA', 'Isc over Imp', iscA / impA, [1.02, 1.18]),
    ...(doubled
      ? ([
          {
            path: 'module.cellsInSeries',
            tone: 'unusual',
            text: `${shown(perCell, 2)} V per cell: half-cut modules print twice the cells in series; is it ${cellsInSeries / 2}?`,
          },
        ] satisfies DesignCheck[])
      : usual('module.cellsInSeries', 'Vmp per cell', perCell, [0.42, 0.62], { unit: ' V' })),
    ...usual('module.betaVocPctPerC', 'Voc coefficient', module.betaVocPctPerC, [-0.42, -0.22], {
      unit: ' %/°C',
    }),
    ...usual(
      'module.gammaPmaxPctPerC',
      'Power coefficient',
      module.gammaPmaxPctPerC,
      [-0.5, -0.25],
      {
        unit: ' %/°C',
      },
    ),
  ]
}

function inverterChecks({ inverter }: Design): DesignCheck[] {
  const { ratedKva, ratedKw, efficiency } = inverter
  return [
    ...usual('inverter.ratedKw', 'kVA over kW', ratedKva / ratedKw, [1, 1.2]),
    ...usual('inverter.efficiency', 'Efficiency', 100 * efficiency, [95, 99], {
      digits: 1,
      unit: ' %',
    }),
  ]
}

function transformerChecks(
  one: DesignTransformer,
  index: number,
  { needed }: DesignFigures,
): DesignCheck[] {
  const at = (key: string) => `transformers.${index}.${key}`
  const isPadMount = one.lowKv < 1
  const loading = (100 * needed.inverterKva) / (one.count * one.mva * 1000)
  return [
    ...usual(at('impedancePct'), 'Impedance', one.impedancePct, isPadMount ? [4, 8] : [6, 12], {
      unit: ' %',
    }),
    ...usual(at('xOverR'), 'X over R', one.xOverR, isPadMount ? [5, 12] : [15, 45], { digits: 0 }),
    ...(isPadMount
      ? usual(at('mva'), 'Loading', loading, [0, 100], { digits: 0, unit: ' %' })
      : []),
  ]
}
