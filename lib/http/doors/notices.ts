import type { Door } from '@/lib/http/door'
import {
  acknowledgementInput,
  acknowledgementSchema,
  linkAcknowledgement,
  noticeFilter,
  noticePageSchema,
} from '@/lib/schemas/notice'

export const noticeDoors: Door[] = [
  {
    method: 'get',
    path: '/api/notices',
    summary: 'Notices that were sent, wait or failed, newest first',
    action: 'notice.read',
    input: noticeFilter,
    output: noticePageSchema,
  },
  {
    method: 'post',
    path: '/api/acknowledgements',
    summary: 'Acknowledge a clock: no notice about it before the next date',
    action: 'obligation.acknowledge',
    input: acknowledgementInput,
    output: acknowledgementSchema,
    status: 201,
  },
  {
    method: 'post',
    path: '/api/acknowledgements/by-link',
    summary: 'The same by the secret of a notice, as the person it was sent to',
    action: null,
    input: linkAcknowledgement,
    output: acknowledgementSchema,
  },
]
