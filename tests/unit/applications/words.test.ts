import { describe, expect, it } from 'vitest'
import { dueWords, movedWords, stateWords } from '@/components/applications/clock-words'
import { factWords, kindInForce } from '@/components/applications/fact-words'
import { sizeWords } from '@/components/applications/term-words'
import type { FactView, ItemView } from '@/lib/schemas/application'

const zone = 'America/New_York'

function fact(over: Partial<FactView>): FactView {
  return {
    id: 'a',
    seq: 1,
    kind: 'happened',
    step: 'cure',
    stepTitle: 'Cure the deficiency',
    instance: 1,
    obligation: null,
    sentOn: null,
    sentAt: null,
    receivedOn: '2026-11-30',
    receivedAt: null,
    dueOn: null,
    channel: null,
    outcome: null,
    outcomeTitle: null,
    amountMinor: null,
    body: {},
    replacesId: null,
    replacedById: null,
    reason: null,
    recordedAt: '2026-11-30T22:00:00.000Z',
    recordedBy: 'Maren Oxley',
    evidence: [],
    ...over,
  }
}

function item(over: Partial<ItemView>): ItemView {
  return {
    step: 'cure',
    instance: 1,
    obligation: '',
    title: 'Cure the deficiency',
    short: null,
    stage: 'Request',
    party: 'applicant',
    kind: 'normal',
    onLine: true,
    ownerRole: 'developer',
    consequence: { effect: 'withdrawn', say: 'The request is withdrawn.' },
    status: 'open',
    provisional: false,
    outcome: null,
    startOn: '2026-11-12',
    dueOn: '2026-11-30',
    dueAt: '2026-11-30T21:30:00.000Z',
    zone,
    statedDueOn: null,
    startBy: null,
    doneOn: null,
    doneLate: null,
    hourRecorded: null,
    moneyTargetMinor: null,
    moneyHeldMinor: null,
    derivation: [],
    source: { document: 'Invented', section: '1', basis: 'from_memory' },
    standing: {
      state: 'running',
      tone: 'soon',
      left: '2 BD',
      businessDays: 2,
      closesInMinutes: null,
    },
    owner: null,
    acknowledged: null,
    ...over,
  }
}

describe('facts in words', () => {
  const say = (over: Partial<FactView>, facts: FactView[] = []) =>
    factWords(fact(over), { zone, facts })

  it.each([
    ['an event', { outcomeTitle: 'Items supplied' }, 'Cure the deficiency: Items supplied'],
    ['a later round', { instance: 2 }, 'Cure the deficiency, round 2: done'],
    [
      'a stated date',
      { kind: 'stated', dueOn: '2026-12-04' },
      'Cure the deficiency: the utility states Fri 4 Dec 2026',
    ],
    [
      'an extension by length',
      { kind: 'extension', body: { decision: 'asked', lengthDays: 10 } },
      'Cure the deficiency: extension of 10 business days asked',
    ],
    ['a withdrawal', { kind: 'withdrawn', step: null }, 'Request withdrawn'],
    [
      'a request number',
      { kind: 'changed', step: null, body: { terms: { requestNo: 'L2-1' } } },
      'Request number assigned',
    ],
  ] as const)('says %s', (_name, over, title) => {
    expect(say(over as Partial<FactView>).title).toBe(title)
  })

  it('shows hours in the zone of the utility', () => {
    const { details } = say({ receivedAt: '2026-11-30T21:52:00.000Z' })
    expect(details).toContain('Received Mon 30 Nov 2026, 4:52 pm ET')
  })

  it('says a correction as the kind of fact it corrects, through a chain of corrections', () => {
    const first = fact({ id: 'a', kind: 'stated' })
    const second = fact({ id: 'b', kind: 'correction', replacesId: 'a' })
    const third = fact({ id: 'c', kind: 'correction', replacesId: 'b' })
    expect(kindInForce(third, [first, second, third])).toBe('stated')
  })
})

describe('clocks in words', () => {
  it('says the due date with its closing hour and zone, and no hour for the end of a day', () => {
    expect(dueWords(item({}), '2026-11-20')).toBe('Mon 30 Nov, 4:30 pm ET')
    const endOfDay = item({ dueAt: '2026-12-01T05:00:00.000Z' })
    expect(dueWords(endOfDay, '2026-11-20')).toBe('Mon 30 Nov')
    expect(dueWords(item({ dueOn: null, dueAt: null }), '2026-11-20')).toBeNull()
  })

  it('says what a fact moved: ours before theirs, and how many more', () => {
    const theirs = item({ step: 'review', title: 'Review', party: 'operator' })
    const before = [item({ status: 'waiting' }), { ...theirs, status: 'waiting' as const }]
    expect(movedWords(before, [theirs, item({})], '2026-11-20')).toBe(
      'Cure the deficiency due Mon 30 Nov, 4:30 pm ET. 1 more moved.',
    )
  })

  it('says that nothing moved where dates stayed', () => {
    expect(movedWords([item({})], [item({})], '2026-11-20')).toBe('No due date moved.')
    expect(movedWords([item({})], [item({ status: 'done' })], '2026-11-20')).toBe(
      'No due date moved.',
    )
  })

  it('names lateness by whose it is', () => {
    const late = item({})
    late.standing = { ...late.standing, state: 'theirs_late' }
    expect(stateWords(late).text).toBe('they are late')
    late.standing = { ...late.standing, state: 'missed' }
    expect(stateWords(late)).toEqual({ tone: 'missed', text: 'missed' })
  })
})

describe('the size of a request', () => {
  it('shows the furthest megawatts known, with the array where given', () => {
    expect(sizeWords({ requestedMw: 48, dcMw: 62.4 })).toBe('48.0 MWac / 62.4 MWdc')
    expect(sizeWords({ requestedMw: 48, grantedMw: 45.25 })).toBe('45.25 MWac')
    expect(sizeWords({})).toBe('not given yet')
  })
})
