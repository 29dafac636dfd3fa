import { z } from 'zod'

/** A number in a range; the message says what was found and what is allowed. */
export function numberFrom(min: number, max: number, unit = '') {
  const allowed = `${min} to ${max}${unit === '' ? '' : ` ${unit}`}`
  const error = (issue: { input?: unknown }) => `found ${shown(issue.input)}, allowed ${allowed}`
  return z.number({ error }).min(min, { error }).max(max, { error })
}

/** A number above 0 up to a maximum. */
export function positiveUpTo(max: number, unit = '') {
  const allowed = `above 0, up to ${max}${unit === '' ? '' : ` ${unit}`}`
  const error = (issue: { input?: unknown }) => `found ${shown(issue.input)}, allowed ${allowed}`
  return z.number({ error }).gt(0, { error }).max(max, { error })
}

function oneOf<const T extends readonly [string, ...string[]]>(values: T) {
  return z.enum(values, {
    error: (issue) => `found ${shown(issue.input)}, allowed ${values.join(', ')}`,
  })
}

function shown(input: unknown): string {
  if (input === undefined) return 'nothing'
  const text = typeof input === 'string' ? input : (JSON.stringify(input) ?? String(input))
  return text.length > 40 ? `${text.slice(0, 40)}…` : text
}

export const fixedMountingSchema = z.object({
  kind: z.literal('fixed'),
  tiltDeg: numberFrom(0, 90, 'degrees'),
  azimuthDeg: numberFrom(0, 360, 'degrees clockwise from north'),
})

export const trackerMountingSchema = z.object({
  kind: z.literal('single_axis_tracker'),
  axisAzimuthDeg: numberFrom(0, 360, 'degrees clockwise from north'),
  maxRotationDeg: numberFrom(0, 90, 'degrees'),
  groundCoverRatio: numberFrom(0.05, 1),
  backtrack: z.boolean({
    error: (issue) => `found ${shown(issue.input)}, allowed true or false`,
  }),
})

export const mountingSchema = z.discriminatedUnion(
  'kind',
  [fixedMountingSchema, trackerMountingSchema],
  { error: 'allowed kinds are fixed and single_axis_tracker' },
)

export const cellTemperatureSchema = z.discriminatedUnion(
  'model',
  [
    z.object({
      model: z.literal('faiman'),
      u0: numberFrom(5, 100, 'W/m2/K'),
      u1: numberFrom(0, 50, 'W/m2/K per m/s'),
    }),
    z.object({
      model: z.literal('sapm'),
      a: numberFrom(-6, -1),
      b: numberFrom(-0.5, 0),
      deltaT: numberFrom(0, 20, 'C'),
    }),
  ],
  { error: 'allowed models are faiman and sapm' },
)

/** A plant as `POST /api/plant/estimate` takes it. */
export const plantSchema = z.object({
  dcKw: positiveUpTo(5_000_000, 'kW'),
  inverterAcKw: positiveUpTo(5_000_000, 'kW'),
  inverterEfficiency: numberFrom(0.8, 0.999),
  poiLimitKw: positiveUpTo(5_000_000, 'kW').optional(),
  acLossFraction: numberFrom(0, 0.5).optional(),
  mounting: mountingSchema,
  dcLossFraction: numberFrom(0, 1),
  gammaPerC: numberFrom(-0.01, 0, 'per C'),
  albedo: numberFrom(0, 1),
  transposition: oneOf(['perez_1990', 'hay_davies_1980', 'isotropic']),
  incidence: oneOf(['ashrae', 'physical', 'none']),
  cellTemperature: cellTemperatureSchema,
})
export type PlantInput = z.infer<typeof plantSchema>

/** `neededInverterKva`: export limit, power factor there, transformers from the POI inward. */
export const neededKvaInput = z.object({
  limitKw: positiveUpTo(5_000_000, 'kW'),
  powerFactorAtPoi: numberFrom(0.8, 1),
  acLossFraction: numberFrom(0, 0.5).optional(),
  transformers: z.array(
    z.object({
      ratedKva: positiveUpTo(5_000_000, 'kVA'),
      impedancePct: numberFrom(0.5, 25, '%'),
      xOverR: numberFrom(1, 80),
      noLoadKw: numberFrom(0, 10_000, 'kW').optional(),
    }),
  ),
  unityVoltageAt: oneOf(['poi', 'inverter']).optional(),
})
export type NeededKvaInput = z.infer<typeof neededKvaInput>

/** Text of a weather file, or the id of one already kept. */
export const weatherInputSchema = z.union(
  [
    z.strictObject({ id: z.string().min(1).max(100) }),
    z.strictObject({
      text: z.string().min(1).max(4_000_000),
      fileName: z.string().min(1).max(255),
    }),
  ],
  { error: 'allowed is { id } or { text, fileName }' },
)

export const ratiosSchema = z
  .array(numberFrom(0.2, 5))
  .min(1, { error: 'found none, allowed 1 to 50 ratios' })
  .max(50, { error: 'found too many, allowed 1 to 50 ratios' })

/** `POST /api/plant/estimate`. */
export const estimateInput = z.object({
  weather: weatherInputSchema,
  plant: plantSchema,
  ratios: ratiosSchema.optional(),
})
export type EstimateInput = z.infer<typeof estimateInput>

/** `POST /api/plant/strings`. A positive coefficient is the common unit trap and is refused. */
export const stringsInput = z
  .object({
    vocV: positiveUpTo(400, 'V'),
    vmpV: positiveUpTo(400, 'V'),
    betaVocPctPerC: numberFrom(-0.6, 0, '% per C'),
    betaVmpPctPerC: numberFrom(-0.8, 0, '% per C'),
    tMinC: numberFrom(-60, 40, 'C'),
    tCellHotC: numberFrom(25, 110, 'C'),
    systemMaxV: numberFrom(50, 2000, 'V'),
    trackingMinV: numberFrom(10, 1500, 'V'),
  })
  .check((context) => {
    const { vmpV, vocV, trackingMinV, systemMaxV } = context.value
    if (vmpV >= vocV) {
      context.issues.push(below('vmpV', vmpV, `below vocV (${vocV} V)`))
    }
    if (trackingMinV >= systemMaxV) {
      context.issues.push(below('trackingMinV', trackingMinV, `below systemMaxV (${systemMaxV} V)`))
    }
  })
export type StringsInput = z.infer<typeof stringsInput>

function below(path: string, input: number, allowed: string) {
  return {
    code: 'custom' as const,
    path: [path],
    input,
    message: `found ${input}, allowed ${allowed}`,
  }
}

const monthlyMeanSchema = z.object({
  ghiKwhPerM2Day: numberFrom(0, 12, 'kWh/m2 a day'),
  dryBulbC: numberFrom(-50, 50, 'C'),
  windMPerS: numberFrom(0, 25, 'm/s'),
})

/** A synthetic year from twelve monthly means; `stationId` is a name of our own. */
export const syntheticYearInput = z.object({
  site: z.object({
    stationId: z.string().min(1).max(40),
    name: z.string().min(1).max(120),
    region: z.string().max(40),
    latitudeDeg: numberFrom(-66, 66, 'degrees north'),
    longitudeDeg: numberFrom(-180, 180, 'degrees east'),
    elevationM: numberFrom(-430, 6000, 'm'),
    utcOffsetHours: numberFrom(-12, 14, 'h'),
  }),
  months: z.array(monthlyMeanSchema).length(12, { error: 'allowed is exactly 12 months' }),
})
export type SyntheticYearInput = z.infer<typeof syntheticYearInput>
