import { syntheticYear, type SyntheticInputs } from '@/lib/domain/plant/synthetic-year'
import type { WeatherYear } from '@/lib/domain/plant/weather-year'

/** An invented mountain site; no station of that name exists. */
export const SITE: SyntheticInputs = {
  site: {
    stationId: 'SYN-1',
    name: 'Sorrel Wells',
    region: 'Mountain',
    latitudeDeg: 39.5,
    longitudeDeg: -111,
    elevationM: 1500,
    utcOffsetHours: -7,
  },
  months: [2.1, 3.1, 4.3, 5.5, 6.5, 7.3, 7.1, 6.3, 5.0, 3.5, 2.3, 1.8].map((ghi, month) => ({
    ghiKwhPerM2Day: ghi,
    dryBulbC: [-2, 1, 5, 10, 15, 20, 25, 24, 18, 11, 4, -2][month]!,
    windMPerS: 3 + (month % 4) / 2,
  })),
}

/** A fresh synthetic year; tests may write into it. */
export function synthetic(inputs: SyntheticInputs = SITE): WeatherYear {
  const result = syntheticYear(inputs)
  if (!result.ok) throw new Error(result.errors.map((issue) => issue.message).join('\n'))
  return result.year
}

const two = (value: number) => String(value).padStart(2, '0')

/** The year as TMY3 text, values rounded as such files hold them. Albedo is the trap 0.00. */
export function tmy3Lines(year: WeatherYear): string[] {
  const { meta } = year
  const heading = `${meta.stationId},"${meta.name}",UT,${meta.utcOffsetHours.toFixed(1)},${meta.latitudeDeg},${meta.longitudeDeg},${meta.elevationM}`
  const names =
    'Date (MM/DD/YYYY),Time (HH:MM),GHI (W/m^2),GHI source,DNI (W/m^2),DNI source,DHI (W/m^2),DHI source,Dry-bulb (C),Dry-bulb source,Wspd (m/s),Wspd source,Alb (unitless),Alb source'
  const rows = Array.from({ length: 8760 }, (_, i) => {
    const on = `${two(year.month[i]!)}/${two(year.day[i]!)}/${year.year[i]}`
    const light = [year.ghi[i]!, year.dni[i]!, year.dhi[i]!].map((v) => `${Math.round(v)},1`)
    const air = [year.dryBulbC[i]!, year.windMPerS[i]!].map((v) => `${v.toFixed(1)},A`)
    return [on, `${two(year.hour[i]!)}:00`, ...light, ...air, '0.00,F'].join(',')
  })
  return [heading, names, ...rows]
}

export const tmy3Text = (year: WeatherYear) => tmy3Lines(year).join('\n')

/** The year as EPW text: eight heading lines, 35 columns, unused ones at their missing values. */
export function epwLines(year: WeatherYear): string[] {
  const { meta } = year
  const heading = [
    `LOCATION,${meta.name},UT,USA,Invented,${meta.stationId},${meta.latitudeDeg},${meta.longitudeDeg},${meta.utcOffsetHours},${meta.elevationM}`,
    'DESIGN CONDITIONS,0',
    'TYPICAL/EXTREME PERIODS,0',
    'GROUND TEMPERATURES,0',
    'HOLIDAYS/DAYLIGHT SAVINGS,No,0,0,0',
    'COMMENTS 1,Invented',
    'COMMENTS 2,None',
    'DATA PERIODS,1,1,Data,Sunday,1/ 1,12/31',
  ]
  const rows = Array.from({ length: 8760 }, (_, i) => {
    const cells = new Array<string>(35).fill('9999')
    const stamp = [year.year[i], year.month[i], year.day[i], year.hour[i], 0, '?9']
    stamp.forEach((value, k) => (cells[k] = String(value)))
    cells[6] = year.dryBulbC[i]!.toFixed(1)
    cells[13] = String(Math.round(year.ghi[i]!))
    cells[14] = String(Math.round(year.dni[i]!))
    cells[15] = String(Math.round(year.dhi[i]!))
    cells[21] = year.windMPerS[i]!.toFixed(1)
    cells[32] = '999'
    return cells.join(',')
  })
  return [...heading, ...rows]
}
