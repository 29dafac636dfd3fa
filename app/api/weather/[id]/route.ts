import { route } from '@/lib/http/route'
import { getWeather } from '@/lib/services/weather'

/** One weather year's heading and report. */
export const GET = route<undefined, { id: string }>({
  action: 'weather.read',
  run: (ctx, _input, { id }) => getWeather(ctx, id),
})
