import { z } from 'zod'

const kwh = z.number()
const fraction = z.number()

export const weatherMetaSchema = z.object({
  stationId: z.string(),
  name: z.string(),
  region: z.string(),
  latitudeDeg: z.number(),
  longitudeDeg: z.number(),
  elevationM: z.number(),
  utcOffsetHours: z.number(),
  kind: z.enum(['tmy3', 'epw', 'synthetic']),
})

const energies = {
  poaKwhPerM2: z.number(),
  dcKwh: kwh,
  acUnclippedKwh: kwh,
  acKwh: kwh,
  atPoiKwh: kwh,
  exportKwh: kwh,
  clippedFraction: fraction,
  curtailedFraction: fraction,
  limitedFraction: fraction,
  inverterClippedKwh: kwh,
  poiCurtailedKwh: kwh,
  hoursAtInverterLimit: z.number(),
  hoursAtPoiLimit: z.number(),
}

export const annualSchema = z.object({
  ...energies,
  dcP99Kw: z.number(),
  dcP999Kw: z.number(),
  dcMaxKw: z.number(),
  dcPerInverterKw: z.number(),
  dcPerPoiKw: z.number().optional(),
  acCapacityFactor: z.number(),
})

export const monthSchema = z.object({ month: z.number(), ...energies })

/** What `POST /api/plant/estimate` answers, and what a frozen calculation keeps. */
export const estimateResult = z.object({
  weather: weatherMetaSchema,
  annual: annualSchema,
  monthly: z.array(monthSchema).length(12),
  ratios: z.array(
    z.object({ dcAc: z.number(), clippedFraction: fraction, acKwh: kwh, acUnclippedKwh: kwh }),
  ),
  poiRatios: z.array(z.object({ dcPerPoi: z.number(), limitedFraction: fraction, exportKwh: kwh })),
  clippedByHourAndMonth: z.array(z.array(kwh).length(12)).length(24),
  curtailedByHourAndMonth: z.array(z.array(kwh).length(12)).length(24),
  durationCurve: z.array(z.object({ hours: z.number(), kw: z.number() })),
  nextMwdcKwh: kwh,
  methods: z.array(z.object({ step: z.string(), method: z.string(), source: z.string() })),
  engineVersion: z.string(),
})
export type EstimateResult = z.infer<typeof estimateResult>

/** What `POST /api/plant/strings` answers. */
export const stringsResult = z.object({
  vocColdV: z.number(),
  maxModules: z.number(),
  stringVocV: z.number(),
  vmpHotV: z.number(),
  minModules: z.number(),
  account: z.string(),
  source: z.string(),
})
export type StringsResult = z.infer<typeof stringsResult>
