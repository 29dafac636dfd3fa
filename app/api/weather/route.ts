import { route } from '@/lib/http/route'
import { listWeather, uploadWeather } from '@/lib/services/weather'

/** Every weather year that is kept. */
export const GET = route({
  action: 'weather.read',
  run: async (ctx) => ({ items: await listWeather(ctx) }),
})

/** Receives a TMY3 or EPW file as the raw body; headers as for any file. */
export const POST = route({
  action: 'weather.upload',
  status: 201,
  run: (ctx, _input, _params, request) => uploadWeather(ctx, request),
})
