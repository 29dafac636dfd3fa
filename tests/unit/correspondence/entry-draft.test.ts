import { describe, expect, it } from 'vitest'
import {
  fillFromEml,
  inputOf,
  newDraft,
  newProof,
  replyDraft,
  reviseDraft,
  type EntryDraft,
} from '@/app/(inside)/applications/[id]/correspondence/_components/entry-draft'
import { entryInput, type EmlDraft, type Entry, type EntryChoices } from '@/lib/schemas/entry'

const uuid = (last: string) => `a1b2c3d4-0000-4000-8000-${last.padStart(12, '0')}`
const [application, other, utility] = [uuid('1'), uuid('2'), uuid('3')]
const organizations = [
  { id: utility, name: 'Invented Electric', zone: 'America/Denver', contacts: ['L. Desk'] },
]
const step: EntryChoices['steps'][number] = {
  step: 'determined',
  instance: 2,
  title: 'Completeness determination',
  stage: 'Request',
  party: 'operator',
  status: 'open',
  evidence: null,
  outcomes: [
    { key: 'complete', title: 'Complete' },
    { key: 'deficient', title: 'Deficient' },
  ],
  obligations: [],
}
const fresh = newDraft(organizations, new Date('2026-12-02T05:15:00Z'), 'America/Denver')
const ids = { entry: uuid('10'), factOf: (id: string) => uuid(id.slice(-1) + '0') }
const context = {
  applicationId: application,
  ids,
  attachments: [],
  zone: 'America/Denver',
  operatorZone: 'America/Denver',
}

const entry: Entry = {
  id: uuid('20'),
  revisesId: null,
  revisions: 0,
  at: '2026-11-10T18:00:00.000Z',
  zone: 'America/Denver',
  on: '2026-11-10',
  time: '11:00',
  channel: 'email',
  direction: 'in',
  visibility: 'shareable',
  organization: { id: utility, name: 'Invented Electric' },
  parties: 'Desk <desk@utility.test>',
  subject: 'Completeness',
  text: 'Please send the one-line diagram.',
  messageId: '<1@utility.test>',
  replyOwedBy: 'us',
  replyOwedOn: '2026-11-20',
  replySettled: false,
  answersId: null,
  recordedAt: '2026-11-10T19:00:00.000Z',
  recordedBy: 'A Liaison',
  applications: [application, other].map((applicationId) => ({
    applicationId,
    projectName: applicationId,
    step: null,
    instance: null,
  })),
  attachments: [],
  closedAttachments: 0,
  evidenceOf: [],
}

describe('a new form', () => {
  it('is a call, out, internal, now in the zone of the organization, with its first contact', () => {
    expect(inputOf(fresh, context)).toMatchObject({
      channel: 'call',
      direction: 'out',
      visibility: 'internal',
      on: '2026-12-01',
      time: '22:15',
      parties: 'L. Desk',
      organizationId: utility,
    })
  })

  it('lacks only its subject to be recorded', () => {
    const faults = entryInput.safeParse(inputOf(fresh, context)).error?.issues
    expect(faults?.map((issue) => issue.path.join('.'))).toEqual(['subject'])
    const named = { ...fresh, subject: 'Is the request complete?' }
    expect(entryInput.safeParse(inputOf(named, context)).success).toBe(true)
  })

  it('follows the channel in who may read it, until somebody chooses', () => {
    const letter: EntryDraft = { ...fresh, channel: 'letter' }
    expect(inputOf(letter, context).visibility).toBe('shareable')
    expect(inputOf({ ...letter, visibility: 'internal' }, context).visibility).toBe('internal')
  })
})

describe('the event that an entry proves', () => {
  const email: EntryDraft = { ...fresh, channel: 'email', direction: 'in', subject: 'Complete' }
  const proof = { ...newProof(email, step), outcome: 'complete', others: [other] }

  it('is dated as the entry, with its hour where it came by e-mail', () => {
    expect(inputOf({ ...email, proof }, context).facts).toEqual([
      expect.objectContaining({
        applicationId: application,
        kind: 'happened',
        step: 'determined',
        instance: 2,
        outcome: 'complete',
        sentOn: '2026-12-01',
        receivedOn: '2026-12-01',
        receivedAt: '2026-12-02T05:15:00.000Z',
      }),
    ])
  })

  it('is recorded for each further request that the entry concerns, under an id of its own', () => {
    const facts = inputOf({ ...email, others: [other], proof }, context).facts ?? []
    expect(facts.map((fact) => fact.applicationId)).toEqual([application, other])
    expect(new Set(facts.map((fact) => fact.id)).size).toBe(2)
    expect(facts[1]?.instance).toBeUndefined()
  })

  it.each([
    ['out', '2026-12-01', ''],
    ['in', '', '2026-12-01'],
  ] as const)('by a letter %s has only the day that we know', (direction, sentOn, receivedOn) => {
    const letter: EntryDraft = { ...fresh, channel: 'letter', direction }
    expect(newProof(letter, step)).toMatchObject({ sentOn, receivedOn, receivedTime: '' })
  })

  it('needs its outcome chosen unless there is only one', () => {
    expect(newProof(email, step).outcome).toBe('')
    expect(newProof(email, { ...step, outcomes: step.outcomes.slice(0, 1) }).outcome).toBe(
      'complete',
    )
  })
})

describe('a form opened from an entry', () => {
  it('as answer turns the direction and keeps people, subject and requests', () => {
    expect(replyDraft(entry, fresh, application)).toMatchObject({
      answersId: entry.id,
      channel: 'email',
      direction: 'out',
      parties: entry.parties,
      subject: 'Re: Completeness',
      text: '',
      on: fresh.on,
      others: [other],
    })
  })

  it('as revision holds what stands, and can be recorded as it is', () => {
    const draft = reviseDraft(entry, application)
    const input = entryInput.parse(inputOf(draft, context))
    expect(input).toMatchObject({
      revisesId: entry.id,
      on: entry.on,
      time: entry.time,
      text: entry.text,
      replyOwedBy: 'us',
      replyOwedOn: '2026-11-20',
    })
  })
})

describe('an e-mail file dropped on the form', () => {
  const eml: EmlDraft = {
    on: '2026-11-30',
    time: '14:52',
    direction: 'in',
    parties: 'Clerk <clerk@utility.test>',
    subject: 'Determination',
    text: 'Attached.',
    messageId: '<7@utility.test>',
    attachments: [],
    recordedAs: null,
  }

  it('fills an untouched form', () => {
    const { attachments: _none, recordedAs: _no, ...said } = eml
    expect(fillFromEml(fresh, eml)).toMatchObject({ ...said, channel: 'email' })
  })

  it('leaves the words that a person typed', () => {
    const typed = { ...fresh, subject: 'My words', parties: 'My contact' }
    expect(fillFromEml(typed, eml)).toMatchObject({
      subject: 'My words',
      parties: 'My contact',
      text: 'Attached.',
      on: '2026-11-30',
    })
  })
})
