import { route } from '@/lib/http/route'
import { downloadWeatherHours } from '@/lib/services/weather'

/** The hours of a weather year as bytes, for the chain in the browser. */
export const GET = route<undefined, { id: string }>({
  action: 'weather.read',
  run: (ctx, _input, { id }) => downloadWeatherHours(ctx, id),
})
