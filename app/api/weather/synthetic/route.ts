import { route } from '@/lib/http/route'
import { syntheticYearInput } from '@/lib/schemas/plant'
import { createSyntheticWeather } from '@/lib/services/weather'

/** Keeps a synthetic year of twelve monthly means. */
export const POST = route({
  action: 'weather.upload',
  input: syntheticYearInput,
  status: 201,
  run: (ctx, input) => createSyntheticWeather(ctx, input),
})
