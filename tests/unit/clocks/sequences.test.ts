import { describe, expect, it } from 'vitest'
import { libraryProcedures } from '@/lib/domain/clocks/library/all'
import { federalStudyProcess } from '@/lib/domain/clocks/library/study-process'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { schedule } from '@/lib/domain/clocks/schedule'
import { standing } from '@/lib/domain/clocks/standing'
import { calendarOf, itemOf, on, partiesOf, told, type Told } from './told'

const procedure = (key: string) => libraryProcedures.find((one) => one.key === key)!.body
const fastTrack = procedure('federal_fast_track')
const studies = procedure('federal_study_process')
const levelTwo = procedure('state_level_two')
const cooperative = federalStudyProcess({
  facilitiesReturnDays: 15,
  facilitiesDepositMinor: 2_500_000,
  calendarRoll: 'next_business_day',
})

type Row = [step: string, instance: number, dueOn: string]
type Key = 'ave' | 'dml' | 'tfec'

const dueDates = (body: ProcedureBody, key: Key, facts: Told[], rows: Row[]) => {
  const { items, stranded } = schedule(body, partiesOf(key), told(...facts))
  expect(stranded).toEqual([])
  const due = rows.map(([step, instance]) => {
    const item = items.find(
      (one) => one.step === step && one.instance === instance && one.obligation === '',
    )
    return [step, instance, item?.dueOn]
  })
  expect(due).toEqual(rows)
}

// Dates worked by hand with the calendar of each invented utility, for 1 December 2026.
const coldSpringRoad = [
  on('2026-09-28', 'file', 'filed'),
  on('2026-10-09', 'completeness', 'deficient'),
  on('2026-10-23', 'cure', 'supplied'),
  on('2026-11-12', 'completeness', 'deficient', { instance: 2 }),
]

describe('Cold Spring Road, state level 2', () => {
  it('each clock ends on the date counted by hand', () => {
    dueDates(levelTwo, 'dml', coldSpringRoad, [
      ['completeness', 1, '2026-10-13'],
      ['cure', 1, '2026-10-26'],
      ['completeness', 2, '2026-10-30'],
      ['cure', 2, '2026-11-30'],
    ])
  })

  it('the second determination came eight business days late', () => {
    const item = itemOf(levelTwo, partiesOf('dml'), told(...coldSpringRoad), 'completeness', 2)
    expect([item.doneOn, item.doneLate]).toEqual(['2026-11-12', true])
  })

  it('a cure sent 22 minutes past the closing hour is late', () => {
    const cured = on('2026-11-30', 'cure', 'supplied', {
      instance: 2,
      receivedAt: '2026-11-30T21:52:00Z',
    })
    const item = itemOf(levelTwo, partiesOf('dml'), told(...coldSpringRoad, cured), 'cure', 2)
    expect(item.dueAt).toBe('2026-11-30T21:30:00.000Z')
    expect(item.doneLate).toBe(true)
  })

  it('the row says missed yesterday, and that withdrawal takes a notice', () => {
    const item = itemOf(levelTwo, partiesOf('dml'), told(...coldSpringRoad), 'cure', 2)
    const stands = standing(item, '2026-12-01T15:00:00Z', calendarOf('dml'))
    expect([stands.state, stands.left]).toEqual(['missed', 'missed yesterday'])
    expect(item.consequence.effect).toBe('withdrawn_on_notice')
  })

  it('an extension by ten business days reaches 14 December', () => {
    const granted: Told = {
      kind: 'extension',
      step: 'cure',
      instance: 2,
      body: { decision: 'granted', lengthDays: 10 },
    }
    dueDates(levelTwo, 'dml', [...coldSpringRoad, granted], [['cure', 2, '2026-12-14']])
  })

  it('nothing is deemed complete after a cure', () => {
    const item = itemOf(
      levelTwo,
      partiesOf('dml'),
      told(...coldSpringRoad.slice(0, 3)),
      'completeness',
      2,
    )
    expect([item.status, item.dueOn, item.outcome]).toEqual(['open', '2026-10-30', null])
  })
})

describe('Sable Orchard, fast track', () => {
  const offered = [
    on('2026-10-06', 'file', 'filed'),
    on('2026-10-20', 'completeness', 'complete', { sentOn: '2026-10-20' }),
    on('2026-11-10', 'initial_review', 'fail'),
    on('2026-11-13', 'options', 'supplemental'),
  ]
  it('each clock ends on the date counted by hand', () => {
    dueDates(fastTrack, 'ave', offered, [
      ['acknowledge', 1, '2026-10-09'],
      ['completeness', 1, '2026-10-21'],
      ['initial_review', 1, '2026-11-10'],
      ['options_notice', 1, '2026-11-18'],
      ['accept_supplemental', 1, '2026-12-08'],
    ])
  })

  it('accepted on the last day, the review is due 25 January', () => {
    const accepted = on('2026-12-08', 'accept_supplemental', 'accepted')
    dueDates(fastTrack, 'ave', [...offered, accepted], [['supplemental_review', 1, '2027-01-25']])
  })

  it('not accepted, the request goes to the study process and nothing is sent to sign', () => {
    const facts = told(...offered, on('2026-12-08', 'accept_supplemental', 'study'))
    const state = (step: string) => itemOf(fastTrack, partiesOf('ave'), facts, step).status
    expect(state('to_study')).toBe('open')
    expect(['supplemental_review', 'agreement_supplemental', 'sign'].map(state)).toEqual([
      'not_needed',
      'not_needed',
      'not_needed',
    ])
  })
})

const toSignedAgreement = (signedOn: string): Told[] => [
  on('2026-01-12', 'file', 'filed'),
  on('2026-01-20', 'completeness', 'complete'),
  on('2026-02-06', 'initial_review', 'fail'),
  on('2026-02-10', 'options', 'modifications'),
  on('2026-02-17', 'accept_modifications', 'agreed'),
  on('2026-03-02', 'agreement_modifications', 'sent'),
  on(signedOn, 'sign', 'signed'),
]

describe('Linnet Hollow, state level 2', () => {
  const booked: Told[] = [
    ...toSignedAgreement('2026-04-01'),
    { kind: 'scheduled', step: 'witness_test', dueOn: '2026-12-18' },
    { kind: 'scheduled', step: 'operation', dueOn: '2027-01-15' },
  ]
  it('each clock ends on the date counted by hand', () => {
    dueDates(levelTwo, 'dml', booked, [
      ['agreement_modifications', 1, '2026-03-04'],
      ['sign', 1, '2026-04-13'],
      ['test_notice', 1, '2026-12-04'],
      ['insurance', 1, '2026-12-30'],
    ])
  })

  it('a clock before a booked test is provisional until the test was held', () => {
    const notice = on('2026-12-04', 'test_notice', 'given')
    const test = on('2026-12-18', 'witness_test', 'passed')
    const before = itemOf(levelTwo, partiesOf('dml'), told(...booked), 'test_notice')
    expect(before.provisional).toBe(true)
    const held = itemOf(levelTwo, partiesOf('dml'), told(...booked, notice, test), 'witness_test')
    expect([held.status, held.dueOn, held.doneLate]).toEqual(['done', '2026-12-18', false])
  })

  it('a failed test asks for a notice again, before the day newly booked', () => {
    const facts: Told[] = [
      ...booked,
      on('2026-12-04', 'test_notice', 'given'),
      on('2026-12-18', 'witness_test', 'failed'),
    ]
    const undated = itemOf(levelTwo, partiesOf('dml'), told(...facts), 'test_notice', 2)
    expect([undated.status, undated.dueOn]).toEqual(['open', null])
    const again: Told = {
      kind: 'scheduled',
      step: 'witness_test',
      instance: 2,
      dueOn: '2027-01-29',
    }
    dueDates(levelTwo, 'dml', [...facts, again], [['test_notice', 2, '2027-01-14']])
  })
})

describe('Old Mill Ferry, study process', () => {
  it('filed at 17:20 on 16 November it is received on the 17th: ten business days end 3 December', () => {
    const filed = on('2026-11-16', 'file', 'filed', { receivedAt: '2026-11-17T00:20:00Z' })
    dueDates(
      studies,
      'ave',
      [filed],
      [
        ['acknowledge', 1, '2026-11-20'],
        ['completeness', 1, '2026-12-03'],
      ],
    )
  })
})

const toImpactStudies: Told[] = [
  on('2026-05-04', 'file', 'filed'),
  on('2026-05-18', 'completeness', 'complete'),
  on('2026-06-01', 'scoping', 'held'),
]

describe('Bellweather South, a cooperative’s study process', () => {
  const tendered: Told[] = [
    ...toImpactStudies,
    on('2026-06-08', 'study_tender', 'distribution'),
    on('2026-07-10', 'distribution_agreement', 'returned'),
    on('2026-08-21', 'distribution_study', 'upgrades'),
    {
      step: 'facilities_tender',
      outcome: 'sent',
      channel: 'letter',
      sentOn: '2026-11-06',
      receivedOn: '2026-11-10',
    },
    { kind: 'stated', step: 'facilities_agreement', dueOn: '2026-12-04' },
  ]
  const item = () =>
    itemOf(cooperative, partiesOf('tfec'), told(...tendered), 'facilities_agreement')

  it('counts from the letter as deemed received, a day before the date it states', () => {
    expect([item().startOn, item().dueOn, item().statedDueOn]).toEqual([
      '2026-11-09',
      '2026-12-03',
      '2026-12-04',
    ])
    expect(
      item()
        .derivation.map((line) => line.text)
        .join(' '),
    ).toContain('Deemed received Mon 9 Nov')
  })

  it('closes at 16:00 Central on the earlier day', () => {
    expect(item().dueAt).toBe('2026-12-03T22:00:00.000Z')
  })

  it('owes the deposit with it, begun three business days before', () => {
    const deposit = itemOf(
      cooperative,
      partiesOf('tfec'),
      told(...tendered),
      'facilities_agreement',
      1,
      'deposit',
    )
    expect([deposit.moneyTargetMinor, deposit.startBy]).toEqual([2_500_000, '2026-11-30'])
  })

  it('after its draft: comments roll off a Saturday, the final report 15 business days later', () => {
    dueDates(
      cooperative,
      'tfec',
      [
        ...tendered,
        on('2026-12-03', 'facilities_agreement', 'returned'),
        on('2027-02-11', 'facilities_study', 'draft'),
      ],
      [
        ['facilities_study', 1, '2027-02-09'],
        ['draft_comments', 1, '2027-03-15'],
        ['final_report', 1, '2027-04-06'],
      ],
    )
  })
})

describe('Ferris Cut, study process', () => {
  const facts = [
    ...toImpactStudies,
    on('2026-08-03', 'study_tender', 'transmission'),
    on('2026-09-08', 'transmission_agreement', 'returned'),
  ]
  it('the transmission study is due 45 business days after the agreement', () => {
    dueDates(studies, 'ave', facts, [
      ['scoping', 1, '2026-06-02'],
      ['study_tender', 1, '2026-06-08'],
      ['transmission_agreement', 1, '2026-09-15'],
      ['transmission_study', 1, '2026-11-12'],
    ])
  })

  it('is theirs and 11 business days over on 1 December', () => {
    const item = itemOf(studies, partiesOf('ave'), told(...facts), 'transmission_study')
    expect(standing(item, '2026-12-01T18:00:00Z', calendarOf('ave')).left).toBe(
      'theirs, 11 BD over',
    )
  })

  it('without the distribution side, its steps are not needed and hold nothing up', () => {
    const done = told(...facts, on('2026-12-01', 'transmission_study', 'no_upgrades'))
    expect(itemOf(studies, partiesOf('ave'), done, 'distribution_study').status).toBe('not_needed')
    expect(itemOf(studies, partiesOf('ave'), done, 'facilities_tender').dueOn).toBe('2026-12-08')
  })

  it('the facilities study has 30 business days without upgrades and 45 with', () => {
    const until = (outcome: string) => [
      ...facts,
      on('2026-12-01', 'transmission_study', outcome),
      on('2026-12-08', 'facilities_tender', 'sent'),
      on('2027-01-04', 'facilities_agreement', 'returned'),
    ]
    dueDates(studies, 'ave', until('no_upgrades'), [['facilities_study', 1, '2027-02-17']])
    dueDates(studies, 'ave', until('upgrades'), [['facilities_study', 1, '2027-03-10']])
  })
})

describe('Pike Hill Landing, state level 2', () => {
  it('the final accounting is due three months after operation', () => {
    const facts: Told[] = [
      ...toSignedAgreement('2026-04-01'),
      on('2026-08-10', 'test_notice', 'given'),
      on('2026-08-26', 'witness_test', 'passed'),
      on('2026-09-01', 'authorization', 'authorized'),
      on('2026-09-11', 'operation', 'operating'),
    ]
    dueDates(levelTwo, 'dml', facts, [['final_accounting', 1, '2026-12-11']])
    expect(schedule(levelTwo, partiesOf('dml'), told(...facts)).standing).toBe('in_operation')
  })
})
