import { describe, expect, it } from 'vitest'
import { businessCalendar } from '@/lib/domain/clocks/calendar'
import type { Fact } from '@/lib/domain/clocks/facts'
import {
  federalCalendar,
  federalHolidays,
  federalRules,
} from '@/lib/domain/clocks/library-calendars'
import { federalFastTrack } from '@/lib/domain/clocks/library/fast-track'
import { schedule } from '@/lib/domain/clocks/schedule'
import type { Parties } from '@/lib/domain/clocks/schedule-types'
import { standing } from '@/lib/domain/clocks/standing'

const mountain: Parties = {
  operator: {
    name: 'Ambrel Valley',
    zone: 'America/Denver',
    closesAt: '17:00',
    receiptRule: 'next_business_day',
    deemedReceivedDays: null,
    calendar: businessCalendar('Ambrel Valley', {
      ...federalRules,
      holidays: [
        ...federalHolidays,
        {
          name: 'Day after Thanksgiving',
          kind: 'nth_weekday',
          month: 11,
          weekday: 4,
          nth: 4,
          plusDays: 1,
        },
      ],
    }),
  },
}

let seq = 0
const fact = (over: Partial<Fact>): Fact => {
  seq += 1
  return {
    id: `f${seq}`,
    seq,
    kind: 'happened',
    instance: 1,
    body: {},
    recordedAt: '2026-01-01T00:00:00Z',
    ...over,
  }
}
const item = (facts: Fact[], step: string, instance = 1) =>
  schedule(federalFastTrack(), mountain, facts).items.find(
    (one) => one.step === step && one.instance === instance && one.obligation === '',
  )!

const filed = () =>
  fact({
    step: 'file',
    outcome: 'filed',
    receivedOn: '2026-11-16',
    receivedAt: '2026-11-17T00:20:00Z',
  })

describe('the fast track', () => {
  it('counts completeness from the next business day when filed after the closing hour', () => {
    const completeness = item([filed()], 'completeness')
    expect(completeness.status).toBe('open')
    expect(completeness.dueOn).toBe('2026-12-03')
    expect(completeness.derivation.map((line) => line.text).join(' ')).toContain('after 17:00')
  })

  it('opens the cure, its second round after a second deficiency, and keeps both', () => {
    const facts = [
      fact({ step: 'file', outcome: 'filed', receivedOn: '2026-09-28' }),
      fact({ step: 'completeness', outcome: 'deficient', receivedOn: '2026-10-09' }),
      fact({ step: 'cure', outcome: 'supplied', receivedOn: '2026-10-23' }),
      fact({ step: 'completeness', instance: 2, outcome: 'deficient', receivedOn: '2026-11-12' }),
    ]
    expect(item(facts, 'cure').status).toBe('done')
    const second = item(facts, 'cure', 2)
    expect(second.status).toBe('open')
    expect(second.dueOn).toBe('2026-11-30')
    expect(item(facts, 'initial_review').status).toBe('waiting')
    const now = '2026-12-01T16:00:00Z'
    const stands = standing(second, now, federalCalendar)
    expect(stands.state).toBe('missed')
    expect(stands.left).toBe('missed yesterday')
  })

  it('follows the branch of a failed screen to the offer and its fifteen business days', () => {
    const facts = [
      fact({ step: 'file', outcome: 'filed', receivedOn: '2026-10-06' }),
      fact({
        step: 'completeness',
        outcome: 'complete',
        sentOn: '2026-10-20',
        receivedOn: '2026-10-20',
      }),
      fact({ step: 'initial_review', outcome: 'fail', receivedOn: '2026-11-10' }),
      fact({ step: 'options', outcome: 'supplemental', receivedOn: '2026-11-13' }),
    ]
    expect(item(facts, 'initial_review').dueOn).toBe('2026-11-10')
    expect(item(facts, 'agreement_screens').status).toBe('not_needed')
    expect(item(facts, 'accept_supplemental').dueOn).toBe('2026-12-08')
    expect(item(facts, 'options_meeting').status).toBe('closed')
    expect(item(facts, 'sign').status).toBe('waiting')
  })

  it('presumes a cured request complete and marks what follows provisional', () => {
    const facts = [
      fact({ step: 'file', outcome: 'filed', receivedOn: '2026-09-28' }),
      fact({ step: 'completeness', outcome: 'deficient', receivedOn: '2026-10-09' }),
      fact({ step: 'cure', outcome: 'supplied', receivedOn: '2026-10-23' }),
    ]
    const review = item(facts, 'initial_review')
    expect(review.status).toBe('open')
    expect(review.provisional).toBe(true)
  })

  it('counts the test notice backward from the booked test', () => {
    const facts = [
      fact({ step: 'file', outcome: 'filed', receivedOn: '2026-01-12' }),
      fact({ step: 'completeness', outcome: 'complete', receivedOn: '2026-01-20' }),
      fact({ step: 'initial_review', outcome: 'pass', receivedOn: '2026-02-06' }),
      fact({ step: 'agreement_screens', outcome: 'sent', receivedOn: '2026-02-11' }),
      fact({ step: 'sign', outcome: 'signed', receivedOn: '2026-03-02' }),
      fact({ kind: 'scheduled', step: 'witness_test', dueOn: '2026-12-18' }),
    ]
    const notice = item(facts, 'test_notice')
    expect(notice.dueOn).toBe('2026-12-11')
    expect(notice.provisional).toBe(true)
  })

  it('keeps a stranded fact beside the line when a correction takes its ground away', () => {
    const first = fact({ step: 'completeness', outcome: 'deficient', receivedOn: '2026-10-09' })
    const cured = fact({ step: 'cure', outcome: 'supplied', receivedOn: '2026-10-23' })
    const corrected = fact({
      kind: 'correction',
      replacesId: first.id,
      step: 'completeness',
      outcome: 'complete',
      receivedOn: '2026-10-09',
    })
    const facts = [
      fact({ step: 'file', outcome: 'filed', receivedOn: '2026-09-28' }),
      first,
      cured,
      corrected,
    ]
    const result = schedule(federalFastTrack(), mountain, facts)
    expect(result.stranded.map((one) => one.factId)).toEqual([cured.id])
    expect(item(facts, 'initial_review').status).toBe('open')
  })
})

describe('a step whose outcome is presumed', () => {
  it('stands as presumed once its clock ran out, and is nobody’s lateness', () => {
    const facts = [
      fact({ step: 'file', outcome: 'filed', receivedOn: '2026-09-28' }),
      fact({ step: 'completeness', outcome: 'deficient', receivedOn: '2026-10-09' }),
      fact({ step: 'cure', outcome: 'supplied', receivedOn: '2026-10-23' }),
    ]
    const second = item(facts, 'completeness', 2)
    expect(standing(second, '2026-10-26T18:00:00Z', federalCalendar).state).toBe('presumed')
    expect(standing(second, '2026-10-23T18:00:00Z', federalCalendar).state).toBe('theirs_running')
  })
})
