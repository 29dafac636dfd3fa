import { call } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'
import {
  acknowledgementSchema,
  type Acknowledgement,
  type LinkAcknowledgement,
} from '@/lib/schemas/notice'

/** Acknowledges a clock by the secret of a notice. */
export function acknowledgeByLink(input: LinkAcknowledgement): Promise<Acknowledgement> {
  return call(api.acknowledgementByLink(), acknowledgementSchema, { method: 'POST', body: input })
}
