import type { Plant } from '@/lib/domain/plant/plant'
import type { WeatherKind } from '@/lib/domain/plant/weather-year'

/** One step of the chain and the publication its formula comes from. */
export interface Method {
  step: string
  method: string
  source: string
}

const TRANSPOSITION: Record<Plant['transposition'], Method> = {
  perez_1990: {
    step: 'Sky diffuse on the plane',
    method: 'Perez, coefficients for all sites',
    source: 'Perez et al. (1990), Solar Energy 44:271; air mass of Kasten & Young (1989)',
  },
  hay_davies_1980: {
    step: 'Sky diffuse on the plane',
    method: 'Hay and Davies',
    source: 'Hay & Davies (1980)',
  },
  isotropic: {
    step: 'Sky diffuse on the plane',
    method: 'Isotropic sky',
    source: 'Liu & Jordan (1963)',
  },
}

const INCIDENCE: Record<Plant['incidence'], Method> = {
  ashrae: {
    step: 'Incidence-angle loss of the beam',
    method: 'ASHRAE, b0 = 0.05',
    source: 'ASHRAE 93-77; Souka & Safwat (1966)',
  },
  physical: {
    step: 'Incidence-angle loss of the beam',
    method: 'Glass cover by Fresnel and Bouguer, n = 1.526',
    source: 'Duffie & Beckman; De Soto et al. (2006)',
  },
  none: { step: 'Incidence-angle loss of the beam', method: 'None taken', source: 'no source' },
}

const WEATHER: Record<WeatherKind, Method> = {
  tmy3: {
    step: 'Weather',
    method: 'Typical meteorological year, hours as printed',
    source: 'Wilcox & Marion (2008), Users Manual for TMY3 Data Sets, NREL/TP-581-43156',
  },
  epw: {
    step: 'Weather',
    method: 'EnergyPlus weather file, hours as printed',
    source: 'EnergyPlus Auxiliary Programs, weather data format',
  },
  synthetic: {
    step: 'Weather',
    method: 'Synthetic year from twelve monthly means, not measured',
    source: 'Haurwitz (1945) clear sky; Erbs, Klein & Duffie (1982) diffuse share',
  },
}

/** Every step of the chain in order, with the publication behind it. */
export function methodsOf(plant: Plant, kind: WeatherKind): Method[] {
  return [
    WEATHER[kind],
    {
      step: 'Sun position at mid-hour, with refraction',
      method: 'Solar Position Algorithm',
      source: 'Reda & Andreas (2008), NREL/TP-560-34302',
    },
    {
      step: 'Extraterrestrial irradiance',
      method: 'Fourier series, 1,366.1 W/m2',
      source: 'Spencer (1971)',
    },
    ...mountingMethods(plant),
    TRANSPOSITION[plant.transposition],
    {
      step: 'Ground reflection',
      method: `Isotropic ground, albedo ${plant.albedo}`,
      source: 'Liu & Jordan (1963)',
    },
    INCIDENCE[plant.incidence],
    cellMethod(plant),
    {
      step: 'DC power',
      method: 'Linear in irradiance and cell temperature, losses before the inverter',
      source: 'Dobos (2014), NREL/TP-6A20-62641',
    },
    {
      step: 'Inverter',
      method: 'Part-load curve, continued above rated load for the unclipped energy',
      source: 'Dobos (2014), NREL/TP-6A20-62641',
    },
  ]
}

function mountingMethods(plant: Plant): Method[] {
  if (plant.mounting.kind === 'fixed') return []
  const back = plant.mounting.backtrack
  return [
    {
      step: 'Tracker rotation',
      method: back ? 'True tracking with backtracking, level ground' : 'True tracking',
      source: 'Lorenzo, Narvarte & Munoz (2011); Anderson & Mikofski (2020), NREL/TP-5K00-76626',
    },
  ]
}

function cellMethod(plant: Plant): Method {
  const step = 'Cell temperature'
  return plant.cellTemperature.model === 'faiman'
    ? { step, method: 'Faiman', source: 'Faiman (2008)' }
    : { step, method: 'SAPM', source: 'King et al. (2004), SAND2004-3535' }
}
