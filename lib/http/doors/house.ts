import type { Door } from '@/lib/http/door'
import { healthSchema } from '@/lib/schemas/health'

export const houseDoors: Door[] = [
  {
    method: 'get',
    path: '/api/health',
    summary: 'Whether the parts of the product answer; 503 when the database is down',
    action: null,
    output: healthSchema,
  },
  {
    method: 'get',
    path: '/api/openapi.json',
    summary: 'This description',
    action: null,
    outputType: 'application/json',
  },
]
