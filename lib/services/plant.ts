import { stringLimits, type StringLimits } from '@/lib/domain/plant/strings'
import { readWeather } from '@/lib/domain/plant/weather'
import type { WeatherYear } from '@/lib/domain/plant/weather-year'
import { estimateYear, type YearResult } from '@/lib/domain/plant/year'
import type { EstimateInput, StringsInput } from '@/lib/schemas/plant'
import { authorize, type Context } from '@/lib/services/context'
import { invalid, ServiceError } from '@/lib/services/errors'
import { accepted, getWeatherYear } from '@/lib/services/weather'

/**
 * A year of a plant on a kept weather year or on the text of a file; nothing is stored.
 * @throws ServiceError `invalid` for an unknown weather year or a file that cannot be read.
 */
export async function estimatePlant(ctx: Context, input: EstimateInput): Promise<YearResult> {
  authorize(ctx, 'plant.estimate')
  return estimateYear(await weatherFor(ctx, input.weather), input.plant, input.ratios)
}

async function weatherFor(ctx: Context, from: EstimateInput['weather']): Promise<WeatherYear> {
  if ('text' in from) return accepted(readWeather(from.text), 'weather.text').year
  try {
    return (await getWeatherYear(ctx, from.id)).year
  } catch (error) {
    if (!(error instanceof ServiceError) || error.code !== 'not_found') throw error
    throw invalid([{ path: 'weather.id', message: `There is no weather year ${from.id}.` }])
  }
}

/** Longest and shortest string of a module; nothing is stored. */
export async function checkStrings(ctx: Context, input: StringsInput): Promise<StringLimits> {
  authorize(ctx, 'plant.estimate')
  return stringLimits(input)
}
