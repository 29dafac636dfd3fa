import type { Door } from '@/lib/http/door'
import {
  checkExhibitInput,
  exhibitListSchema,
  exhibitRevisionSchema,
  prepareExhibitInput,
} from '@/lib/schemas/exhibit'

export const exhibitDoors: Door[] = [
  {
    method: 'get',
    path: '/api/applications/{id}/exhibits',
    summary: 'Every revision of an application’s exhibits, the latest first',
    action: 'exhibit.read',
    output: exhibitListSchema,
  },
  {
    method: 'post',
    path: '/api/applications/{id}/exhibits',
    summary:
      'Prepare the next revision of exhibit C from a frozen calculation; the document is made in the background',
    action: 'exhibit.prepare',
    input: prepareExhibitInput,
    output: exhibitRevisionSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/exhibits/{id}',
    summary: 'One revision as it stands now',
    action: 'exhibit.read',
    output: exhibitRevisionSchema,
  },
  {
    method: 'get',
    path: '/api/exhibits/{id}/document',
    summary: 'The DOCX of a revision; 409 while it is being made',
    action: 'exhibit.read',
    outputType: 'application/vnd.openxmlformats-officedocument.wordprocessingml.document',
  },
  {
    method: 'post',
    path: '/api/exhibits/{id}/check',
    summary: 'Sign a draft as checked; refused to its preparer',
    action: 'exhibit.check',
    input: checkExhibitInput,
    output: exhibitRevisionSchema,
  },
  {
    method: 'post',
    path: '/api/exhibits/{id}/issue',
    summary: 'Issue a checked revision and freeze its bytes; refused where it is out of step',
    action: 'exhibit.issue',
    output: exhibitRevisionSchema,
  },
  {
    method: 'post',
    path: '/api/exhibits/{id}/make',
    summary: 'Ask once more for a document that failed or never came',
    action: 'exhibit.prepare',
    output: exhibitRevisionSchema,
  },
]
