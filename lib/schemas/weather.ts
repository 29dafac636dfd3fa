import { z } from 'zod'
import { uuid } from '@/lib/schemas/common'
import { sha256Schema } from '@/lib/schemas/file'
import { weatherMetaSchema } from '@/lib/schemas/plant-result'

/** Largest weather file, in bytes; a typical year has about 1.7 MB. */
export const weatherLimitBytes = 20_000_000

export const weatherReportSchema = z.object({
  rowsRead: z.number(),
  gaps: z.array(z.string()),
  missingHours: z.object({ dryBulb: z.number(), wind: z.number() }),
  flaggedHours: z.number(),
  annual: z.object({
    ghiKwhPerM2: z.number(),
    dniKwhPerM2: z.number(),
    dhiKwhPerM2: z.number(),
  }),
  dryBulbC: z.object({ mean: z.number(), min: z.number(), max: z.number() }),
  meanWindMPerS: z.number(),
  sourceYears: z.array(z.number()),
  closure: z.object({
    hoursTested: z.number(),
    rmsWhPerM2: z.number(),
    bestShiftHours: z.number(),
    bestRmsWhPerM2: z.number(),
    hoursOver100: z.number(),
    agrees: z.boolean(),
    words: z.string(),
  }),
  defectHours: z.array(
    z.object({
      row: z.number(),
      stamp: z.string(),
      kind: z.enum(['ghi_above_possible', 'dni_above_extraterrestrial']),
      found: z.number(),
      allowed: z.number(),
      message: z.string(),
    }),
  ),
  warnings: z.array(z.string()),
})

/** A weather year that is kept: its heading and what reading it found. */
export const weatherSchema = z.object({
  id: uuid,
  sha256: sha256Schema,
  kind: z.enum(['tmy3', 'epw', 'synthetic']),
  name: z.string(),
  meta: weatherMetaSchema,
  report: weatherReportSchema,
  recordedAt: z.string(),
})
export type Weather = z.infer<typeof weatherSchema>
export const weatherListSchema = z.object({ items: z.array(weatherSchema) })
