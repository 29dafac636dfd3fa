import type { Door } from '@/lib/http/door'
import {
  calculationInput,
  calculationListSchema,
  calculationSchema,
  designRevisionInput,
  designRevisionListSchema,
  designRevisionSchema,
} from '@/lib/schemas/design'
import { estimateInput, stringsInput, syntheticYearInput } from '@/lib/schemas/plant'
import { estimateResult, stringsResult } from '@/lib/schemas/plant-result'
import { weatherListSchema, weatherSchema } from '@/lib/schemas/weather'

export const plantDoors: Door[] = [
  {
    method: 'post',
    path: '/api/plant/estimate',
    summary: 'Hourly energy of a plant over a weather year with its limits; stores nothing',
    action: 'plant.estimate',
    input: estimateInput,
    output: estimateResult,
  },
  {
    method: 'post',
    path: '/api/plant/strings',
    summary: 'Longest string by cold voltage and shortest by hot voltage; stores nothing',
    action: 'plant.estimate',
    input: stringsInput,
    output: stringsResult,
  },
  {
    method: 'get',
    path: '/api/weather',
    summary: 'Weather years that are kept, the latest first',
    action: 'weather.read',
    output: weatherListSchema,
  },
  {
    method: 'post',
    path: '/api/weather',
    summary:
      'Upload a TMY3 or EPW file as the raw body, up to 20 MB; headers x-file-name (URI-encoded) and x-content-sha256',
    action: 'weather.upload',
    inputType: 'application/octet-stream',
    output: weatherSchema,
    status: 201,
  },
  {
    method: 'post',
    path: '/api/weather/synthetic',
    summary: 'Keep a synthetic year of twelve monthly means, marked as such everywhere',
    action: 'weather.upload',
    input: syntheticYearInput,
    output: weatherSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/weather/{id}',
    summary: 'One weather year: heading and report of what was read',
    action: 'weather.read',
    output: weatherSchema,
  },
  {
    method: 'get',
    path: '/api/weather/{id}/hours',
    summary: 'The hours of a weather year as bytes',
    action: 'weather.read',
    outputType: 'application/octet-stream',
  },
]

export const designDoors: Door[] = [
  {
    method: 'get',
    path: '/api/projects/{id}/design',
    summary: 'Design revisions of a project, the latest first',
    action: 'design.read',
    output: designRevisionListSchema,
  },
  {
    method: 'post',
    path: '/api/projects/{id}/design',
    summary: 'Add a design revision; refused where baseNo is not the latest',
    action: 'design.write',
    input: designRevisionInput,
    output: designRevisionSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/applications/{id}/calculations',
    summary: 'Frozen calculations of an application, the latest first',
    action: 'calculation.read',
    output: calculationListSchema,
  },
  {
    method: 'post',
    path: '/api/applications/{id}/calculations',
    summary: 'Freeze a calculation of a design revision; the same id again is the same one',
    action: 'calculation.freeze',
    input: calculationInput,
    output: calculationSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/applications/{id}/calculations/{no}',
    summary: 'One frozen calculation by its number',
    action: 'calculation.read',
    output: calculationSchema,
  },
]
