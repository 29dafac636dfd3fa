import { route } from '@/lib/http/route'
import { newApplicationInput, pipelineFilter } from '@/lib/schemas/application'
import { createApplication } from '@/lib/services/applications'
import { listApplications } from '@/lib/services/pipeline'

export const GET = route({ input: pipelineFilter, run: listApplications })
export const POST = route({
  action: 'application.create',
  input: newApplicationInput,
  status: 201,
  run: createApplication,
})
