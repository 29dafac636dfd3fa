import { plantOf, type Design } from '@/lib/domain/plant/design'
import { prepareYear, type PreparedYear } from '@/lib/domain/plant/plane'
import { subHourlyAllowance, type SubHourlyAllowance } from '@/lib/domain/plant/sub-hourly'
import type { WeatherYear } from '@/lib/domain/plant/weather-year'
import { DEFAULT_RATIOS, planeInputsOf, runYear, type YearResult } from '@/lib/domain/plant/year'

/** A year of a design: energies in kWh, and beside them what hourly means hide. */
export interface DesignYear extends YearResult {
  subHourly: SubHourlyAllowance
}

/** Runs designs over one weather year; what the modules' plane receives is kept between runs. */
export interface DesignRunner {
  run: (design: Design) => DesignYear
}

/**
 * The one way a design becomes figures: the page's worker and the freezing server both call it, so
 * that they agree to the last digit.
 */
export function designRunner(weather: WeatherYear): DesignRunner {
  let key = ''
  let prepared: PreparedYear | undefined
  return {
    run(design) {
      const plant = plantOf(design)
      const plane = planeInputsOf(plant)
      const wanted = JSON.stringify(plane)
      if (!prepared || wanted !== key) prepared = prepareYear(weather, plane)
      key = wanted
      return {
        ...runYear(prepared, plant, DEFAULT_RATIOS),
        subHourly: subHourlyAllowance(prepared, plant),
      }
    },
  }
}
