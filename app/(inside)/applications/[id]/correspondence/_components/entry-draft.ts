import { isCivilDate } from '@/lib/domain/clocks/civil-date'
import type { Channel } from '@/lib/domain/clocks/facts'
import { instantOf, localOf } from '@/lib/domain/clocks/zoned'
import { usualVisibility, type Direction, type Visibility } from '@/lib/domain/correspondence'
import type { EmlDraft, Entry, EntryChoices, EntryInputGiven } from '@/lib/schemas/entry'
import type { UploadedFile } from '@/lib/schemas/file'

/** What stands in the form; empty text where nothing was chosen. */
export interface EntryDraft {
  revisesId?: string
  answersId?: string
  messageId?: string
  channel: Channel
  direction: Direction
  /** Undefined: as is usual for the channel. */
  visibility?: Visibility
  organizationId: string
  parties: string
  subject: string
  text: string
  on: string
  time: string
  replyOwedBy: '' | 'us' | 'them'
  replyOwedOn: string
  /** Further applications the entry concerns. */
  others: string[]
  proof: Proof | null
}

/** The event that the entry proves. */
export interface Proof {
  step: string
  instance: number
  outcome: string
  sentOn: string
  receivedOn: string
  receivedTime: string
  reason: string
  /** Further applications in which it proves the same step. */
  others: string[]
}

/** Ids made once a form: a second press is the same entry and the same events. */
export interface FormIds {
  entry: string
  /** One a concerned application. */
  factOf: (applicationId: string) => string
}

type Organizations = EntryChoices['organizations']

/** A call, out, now: what is recorded most often and in the greatest hurry. */
export function newDraft(organizations: Organizations, now: Date, zone: string): EntryDraft {
  const local = localOf(now.toISOString(), zone)
  const first = organizations[0]
  return {
    channel: 'call',
    direction: 'out',
    organizationId: first?.id ?? '',
    parties: first?.contacts[0] ?? first?.name ?? '',
    subject: '',
    text: '',
    on: local.on,
    time: local.time.slice(0, 5),
    replyOwedBy: '',
    replyOwedOn: '',
    others: [],
    proof: null,
  }
}

/** An answer to an entry: the other direction, the same people. */
export function replyDraft(entry: Entry, fresh: EntryDraft, applicationId: string): EntryDraft {
  return {
    ...fresh,
    answersId: entry.id,
    channel: entry.channel,
    direction: entry.direction === 'in' ? 'out' : 'in',
    organizationId: entry.organization?.id ?? fresh.organizationId,
    parties: entry.parties,
    subject: /^re: /i.test(entry.subject) ? entry.subject : `Re: ${entry.subject}`,
    others: othersOf(entry, applicationId),
  }
}

/** The next revision of an entry, as it stands. */
export function reviseDraft(entry: Entry, applicationId: string): EntryDraft {
  return {
    revisesId: entry.id,
    answersId: entry.answersId ?? undefined,
    channel: entry.channel,
    direction: entry.direction,
    visibility: entry.visibility,
    organizationId: entry.organization?.id ?? '',
    parties: entry.parties,
    subject: entry.subject,
    text: entry.text,
    on: entry.on,
    time: entry.time,
    replyOwedBy: entry.replyOwedBy ?? '',
    replyOwedOn: entry.replyOwedOn ?? '',
    others: othersOf(entry, applicationId),
    proof: null,
  }
}

function othersOf(entry: Entry, applicationId: string): string[] {
  return entry.applications.map((one) => one.applicationId).filter((id) => id !== applicationId)
}

/** Fills what an e-mail says; words that a person typed stay. */
export function fillFromEml(draft: EntryDraft, eml: EmlDraft): EntryDraft {
  const isUntouched = draft.subject === '' && draft.text === ''
  return {
    ...draft,
    channel: 'email',
    direction: eml.direction,
    on: eml.on ?? draft.on,
    time: eml.time ?? draft.time,
    parties: isUntouched && eml.parties ? eml.parties : draft.parties,
    subject: draft.subject || eml.subject,
    text: draft.text || eml.text,
    messageId: draft.revisesId ? undefined : (eml.messageId ?? undefined),
  }
}

/** A proof of this step, dated as the entry; a letter in has a receipt that only we know. */
export function newProof(draft: EntryDraft, step: EntryChoices['steps'][number]): Proof {
  const isOnTheWay = draft.channel === 'letter' && draft.direction === 'out'
  const hasHour = draft.channel === 'email' || draft.channel === 'portal'
  return {
    step: step.step,
    instance: step.instance,
    outcome: step.outcomes.length === 1 ? (step.outcomes[0]?.key ?? '') : '',
    sentOn: draft.channel === 'letter' && draft.direction === 'in' ? '' : draft.on,
    receivedOn: isOnTheWay ? '' : draft.on,
    receivedTime: hasHour ? draft.time : '',
    reason: '',
    others: [],
  }
}

interface InputContext {
  applicationId: string
  ids: FormIds
  attachments: readonly UploadedFile[]
  /** Zone of date and hour of the entry. */
  zone: string
  /** Zone of the operator, in which the event's hour is read. */
  operatorZone: string
}

/** The draft as the entry's input; its schema checks it. */
export function inputOf(draft: EntryDraft, context: InputContext): EntryInputGiven {
  const { applicationId, ids, attachments, zone } = context
  return {
    id: ids.entry,
    revisesId: draft.revisesId,
    answersId: draft.answersId,
    on: draft.on,
    time: draft.time,
    zone,
    channel: draft.channel,
    direction: draft.direction,
    visibility: draft.visibility ?? usualVisibility(draft.channel),
    organizationId: draft.organizationId || undefined,
    parties: draft.parties,
    subject: draft.subject,
    text: draft.text,
    messageId: draft.messageId,
    replyOwedBy: draft.replyOwedBy || undefined,
    replyOwedOn: draft.replyOwedBy ? draft.replyOwedOn || undefined : undefined,
    applications: [applicationId, ...draft.others].map((id) => ({ applicationId: id })),
    attachments: attachments.map(({ sha256, name }) => ({ sha256, name })),
    facts: factsOf(draft, context),
  }
}

function factsOf(draft: EntryDraft, context: InputContext): EntryInputGiven['facts'] {
  const { proof, others, channel } = draft
  if (!proof) return []
  const concerned = [context.applicationId, ...proof.others.filter((id) => others.includes(id))]
  return concerned.map((applicationId) => ({
    id: context.ids.factOf(applicationId),
    applicationId,
    kind: 'happened' as const,
    step: proof.step,
    instance: applicationId === context.applicationId ? proof.instance : undefined,
    outcome: proof.outcome || undefined,
    sentOn: proof.sentOn || undefined,
    receivedOn: proof.receivedOn || undefined,
    receivedAt: hourOf(proof, context.operatorZone),
    reason: proof.reason || undefined,
    channel,
  }))
}

function hourOf(proof: Proof, zone: string): string | undefined {
  const { receivedOn, receivedTime } = proof
  if (!receivedTime || !isCivilDate(receivedOn)) return undefined
  return instantOf(receivedOn, receivedTime, zone)
}
