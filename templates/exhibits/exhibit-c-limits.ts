import { figure } from '@/components/chart/scale'
import { distanceKm } from '@/lib/domain/distance'
import type { ExhibitSource } from '@/lib/domain/exhibits'
import { figuresOf } from '@/lib/domain/plant/design'

/** What the estimate does not know, each with the size or source as far as there is one. */
export function limitsOf(source: ExhibitSource): { lead: string; text: string }[] {
  const { design, result } = source
  const { needed } = figuresOf(design)
  return [
    {
      lead: 'Within the hour.',
      text: `Hourly means hide what passing clouds do, so hourly data understate clipping. ${result.subHourly.account} Source: ${result.subHourly.source}.`,
    },
    { lead: 'Weather.', text: weatherWords(source) },
    {
      lead: 'Losses.',
      text: 'Constant fractions over the year, booked in the order array, inverter, loss to the POI, export limit. Unclipped energy continues the inverter’s part-load curve above its rated load. Shading between rows, snow by the day, outages by the hour, thermal lag and low-light behavior are not modelled; the ground is taken as level.',
    },
    {
      lead: 'Apparent power.',
      text: `${needed.account} Series I²R and I²X of the transformers as one circuit with the POI at 1 per unit; charging of the collector and reactance of the line are left out.`,
    },
  ]
}

const KINDS = {
  tmy3: 'A typical year (TMY3), put together from months of different years: single years lie above and below it.',
  epw: 'A typical year (EPW) as its file says: single years lie above and below it.',
  synthetic:
    'A synthetic year made from twelve monthly means, not measured hour by hour: it shows the season, not the true run of clear and cloudy hours.',
}

function weatherWords({ result, data, weatherName }: ExhibitSource): string {
  const { weather } = result
  const reason = data.weatherReason
    ? ` Reason given: ${data.weatherReason.replace(/\.$/, '')}.`
    : ''
  return `${weatherName} (${weather.stationId}), ${figure(weather.elevationM, 0)} m above sea level${distanceWords(weather, data.project)}. ${KINDS[weather.kind]}${reason}`
}

function distanceWords(
  station: { latitudeDeg: number; longitudeDeg: number },
  { latitude, longitude }: ExhibitSource['data']['project'],
): string {
  if (latitude === null || longitude === null) return ''
  const km = distanceKm(station, { latitudeDeg: latitude, longitudeDeg: longitude })
  return `, ${figure(km, km < 10 ? 1 : 0)} km (${figure(km / 1.609344, km < 10 ? 1 : 0)} miles) from the project`
}
