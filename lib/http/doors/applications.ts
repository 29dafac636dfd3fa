import type { Door } from '@/lib/http/door'
import {
  applicationViewSchema,
  dueFilter,
  dueSchema,
  newApplicationInput,
  pipelineFilter,
  pipelineSchema,
} from '@/lib/schemas/application'
import { assignmentInput } from '@/lib/schemas/assignment'
import { countAnswer, countInput } from '@/lib/schemas/count'
import { factInput } from '@/lib/schemas/fact'
import { milestonesSchema } from '@/lib/schemas/milestone'

export const applicationDoors: Door[] = [
  {
    method: 'get',
    path: '/api/applications',
    summary: 'Applications with step line, next clock and how it stands',
    action: 'application.read',
    input: pipelineFilter,
    output: pipelineSchema,
  },
  {
    method: 'post',
    path: '/api/applications',
    summary: 'Start an application from a procedure',
    action: 'application.create',
    input: newApplicationInput,
    output: applicationViewSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/applications/{id}',
    summary: 'One application: obligations, facts, what can be recorded',
    action: 'application.read',
    output: applicationViewSchema,
  },
  {
    method: 'post',
    path: '/api/applications/{id}/facts',
    summary: 'Record a fact; answers with the new schedule',
    action: 'fact.record',
    input: factInput,
    output: applicationViewSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/applications/{id}/milestones',
    summary: 'Dated steps with their derivation',
    action: 'application.read',
    output: milestonesSchema,
  },
  {
    method: 'get',
    path: '/api/obligations',
    summary: 'What is owed, by me, by us or by the utilities',
    action: 'obligation.read',
    input: dueFilter,
    output: dueSchema,
  },
  {
    method: 'post',
    path: '/api/assignments',
    summary: 'Name who holds an obligation',
    action: 'obligation.assign',
    input: assignmentInput,
    status: 201,
  },
  {
    method: 'post',
    path: '/api/clocks/count',
    summary: 'Count a clock by a calendar, with its account',
    action: 'clock.count',
    input: countInput,
    output: countAnswer,
  },
]
