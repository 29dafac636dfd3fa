import { call, problemOf, unreachable } from '@/lib/client/fetcher'
import { upload, type UploadOptions } from '@/lib/client/upload'
import { api } from '@/lib/routes'
import {
  calculationSchema,
  designRevisionSchema,
  type Calculation,
  type CalculationInput,
  type DesignRevision,
  type DesignRevisionInput,
} from '@/lib/schemas/design'
import { weatherSchema, type Weather } from '@/lib/schemas/weather'

/** Adds a design revision. Throws `ProblemError`: 409 where a later one is there. */
export function saveDesign(projectId: string, input: DesignRevisionInput): Promise<DesignRevision> {
  return call(api.projectDesign(projectId), designRevisionSchema, { method: 'POST', body: input })
}

/** Freezes a calculation of a saved revision. Throws `ProblemError`. */
export function freeze(applicationId: string, input: CalculationInput): Promise<Calculation> {
  return call(api.calculations(applicationId), calculationSchema, { method: 'POST', body: input })
}

/** Sends a weather file with progress. Throws `ProblemError`: 422 with row, found and allowed. */
export function sendWeather(
  file: File,
  options: Pick<UploadOptions, 'signal' | 'onProgress'>,
): Promise<Weather> {
  const headers = { 'x-file-name': encodeURIComponent(file.name) }
  return upload(api.weather(), file, weatherSchema, { ...options, headers })
}

/** The hours of a weather year as bytes for `unpackWeather`. Throws `ProblemError`. */
export async function loadWeatherHours(id: string, signal?: AbortSignal): Promise<ArrayBuffer> {
  const response = await fetch(api.weatherHours(id), { signal, credentials: 'same-origin' }).catch(
    (error: unknown) => {
      if (signal?.aborted) throw error
      throw unreachable()
    },
  )
  if (!response.ok) throw problemOf(response.status, await response.text())
  return response.arrayBuffer()
}
