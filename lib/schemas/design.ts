import { z } from 'zod'
import { shortText, uuid } from '@/lib/schemas/common'
import { sha256Schema } from '@/lib/schemas/file'
import {
  cellTemperatureSchema,
  mountingSchema,
  numberFrom,
  positiveUpTo,
} from '@/lib/schemas/plant'
import { estimateResult } from '@/lib/schemas/plant-result'

const whole = (min: number, max: number, unit = '') =>
  numberFrom(min, max, unit).refine(Number.isInteger, {
    error: (issue) => `found ${String(issue.input)}, allowed whole numbers`,
  })

export const designModuleSchema = z.object({
  name: shortText('The name of the module', 120),
  pmaxW: positiveUpTo(1500, 'W'),
  vocV: positiveUpTo(400, 'V'),
  vmpV: positiveUpTo(400, 'V'),
  iscA: positiveUpTo(40, 'A'),
  impA: positiveUpTo(40, 'A'),
  betaVocPctPerC: numberFrom(-0.6, 0, '%/°C'),
  betaVmpPctPerC: numberFrom(-0.8, 0, '%/°C'),
  gammaPmaxPctPerC: numberFrom(-1, 0, '%/°C'),
  cellsInSeries: whole(1, 200, 'cells'),
  maxSystemV: numberFrom(50, 2000, 'V'),
})

export const designInverterSchema = z.object({
  name: shortText('The name of the inverter', 120),
  count: whole(1, 5000),
  ratedKva: positiveUpTo(20_000, 'kVA'),
  ratedKw: positiveUpTo(20_000, 'kW'),
  efficiency: numberFrom(0.8, 0.999),
  mpptMinV: numberFrom(10, 1500, 'V'),
  mpptMaxV: numberFrom(10, 2000, 'V'),
  maxDcV: numberFrom(50, 2000, 'V'),
  faultPerUnit: numberFrom(0.5, 5, 'per unit'),
})

export const designTransformerSchema = z.object({
  name: shortText('The name of the transformer', 120),
  count: whole(1, 5000),
  mva: positiveUpTo(2000, 'MVA'),
  impedancePct: numberFrom(0.5, 25, '%'),
  xOverR: numberFrom(1, 80),
  highKv: positiveUpTo(800, 'kV'),
  lowKv: positiveUpTo(800, 'kV'),
  winding: shortText('The winding', 40),
})

const modelsSchema = z.object({
  transposition: z.enum(['perez_1990', 'hay_davies_1980', 'isotropic']),
  incidence: z.enum(['ashrae', 'physical', 'none']),
  cellTemperature: cellTemperatureSchema,
})

const lossSchema = z.object({
  name: shortText('The name of the loss', 60),
  fraction: numberFrom(0, 0.5),
})

/** A plant as it is designed, units in the names; `plantOf` of lib/domain turns it into a plant. */
export const designBodySchema = z
  .object({
    module: designModuleSchema,
    modulesPerString: whole(1, 60, 'modules'),
    strings: whole(1, 500_000, 'strings'),
    mounting: mountingSchema,
    inverter: designInverterSchema,
    exportLimitMw: positiveUpTo(5000, 'MW'),
    limitKeptBy: shortText('How the limit is kept', 200),
    powerFactorAtPoi: numberFrom(0.8, 1),
    /** From the POI inward. */
    transformers: z.array(designTransformerSchema).max(10),
    acLossFraction: numberFrom(0, 0.5),
    dcLosses: z.array(lossSchema).max(20),
    albedo: numberFrom(0, 1),
    site: z.object({ tMinC: numberFrom(-60, 40, '°C'), tCellHotC: numberFrom(25, 110, '°C') }),
    models: modelsSchema,
  })
  .check((context) => {
    const { module, inverter } = context.value
    const add = (path: string[], input: number, allowed: string) =>
      context.issues.push({
        code: 'custom',
        path,
        input,
        message: `found ${input}, allowed ${allowed}`,
      })
    if (module.vmpV >= module.vocV)
      add(['module', 'vmpV'], module.vmpV, `below the open-circuit voltage, ${module.vocV} V`)
    if (module.impA >= module.iscA)
      add(['module', 'impA'], module.impA, `below the short-circuit current, ${module.iscA} A`)
    if (inverter.mpptMinV >= inverter.mpptMaxV)
      add(['inverter', 'mpptMinV'], inverter.mpptMinV, `below ${inverter.mpptMaxV} V`)
    if (inverter.mpptMaxV > inverter.maxDcV)
      add(['inverter', 'mpptMaxV'], inverter.mpptMaxV, `up to ${inverter.maxDcV} V`)
    if (inverter.ratedKw > inverter.ratedKva)
      add(['inverter', 'ratedKw'], inverter.ratedKw, `up to ${inverter.ratedKva} kVA`)
  })
export type DesignBody = z.infer<typeof designBodySchema>

/** A revision to add; `baseNo` is the revision the writer saw, 0 where there was none. */
export const designRevisionInput = z.object({
  id: uuid,
  baseNo: whole(0, 100_000),
  body: designBodySchema,
  weatherId: uuid.optional(),
  note: z.string().trim().max(500, 'At most 500 characters.').optional(),
})
export type DesignRevisionInput = z.infer<typeof designRevisionInput>

export const designRevisionSchema = z.object({
  id: uuid,
  projectId: uuid,
  no: z.number(),
  body: designBodySchema,
  weatherId: uuid.nullable(),
  note: z.string().nullable(),
  recordedAt: z.string(),
  recordedBy: z.string().nullable(),
})
export type DesignRevision = z.infer<typeof designRevisionSchema>
export const designRevisionListSchema = z.object({ items: z.array(designRevisionSchema) })

export const calculationInput = z.object({ id: uuid, designRevisionId: uuid })
export type CalculationInput = z.infer<typeof calculationInput>

/** What a frozen calculation was run on. */
export const calculationInputsSchema = z.object({
  design: designBodySchema,
  designNo: z.number(),
  weather: z.object({ id: uuid, sha256: sha256Schema, name: z.string() }),
  ratios: z.array(z.number()),
})

/** Loss within the hour as a bound, beside the result and never in it. */
export const subHourlySchema = z.object({
  lowPoints: z.number(),
  highPoints: z.number(),
  account: z.string(),
  source: z.string(),
})

export type CalculationInputs = z.infer<typeof calculationInputsSchema>

export const calculationResultSchema = estimateResult.extend({ subHourly: subHourlySchema })
export type CalculationResult = z.infer<typeof calculationResultSchema>

export const calculationSummarySchema = z.object({
  id: uuid,
  no: z.number(),
  designRevisionId: uuid,
  designNo: z.number(),
  weatherId: uuid,
  weatherName: z.string(),
  synthetic: z.boolean(),
  limitedFraction: z.number(),
  exportKwh: z.number(),
  dcPerPoi: z.number(),
  engineVersion: z.string(),
  sha256: sha256Schema,
  recordedAt: z.string(),
  recordedBy: z.string().nullable(),
})
export type CalculationSummary = z.infer<typeof calculationSummarySchema>
export const calculationListSchema = z.object({ items: z.array(calculationSummarySchema) })

export const calculationSchema = calculationSummarySchema.extend({
  applicationId: uuid,
  inputs: calculationInputsSchema,
  result: calculationResultSchema,
})
export type Calculation = z.infer<typeof calculationSchema>
