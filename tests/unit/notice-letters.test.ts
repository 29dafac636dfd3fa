import { describe, expect, it } from 'vitest'
import { digestDay, digestGroup } from '@/lib/domain/digest'
import { clockNotice, type ClockNotice } from '@/templates/notices/clock-notice'
import { digestLetter } from '@/templates/notices/digest'

const notice: ClockNotice = {
  says: 'ahead',
  personName: 'Robin Vale',
  projectName: 'Juniper Flat',
  requestNo: 'AVE-26C-014',
  title: 'Return the signed study agreement',
  organizationName: 'Ambrel Valley',
  isOurs: true,
  dueOn: '2026-12-10',
  dueAt: '2026-12-11T00:00:00Z',
  zone: 'America/Denver',
  today: '2026-12-08',
  businessDaysLeft: 2,
  provisional: false,
  consequence: 'The request is withdrawn.',
  firstAction: null,
  source: 'Made-up procedure, 3.4',
  applicationUrl: 'https://lineside.example/applications/1',
  acknowledgeUrl: 'https://lineside.example/acknowledge/x',
}

describe('the e-mail about a clock', () => {
  it.each<[string, Partial<ClockNotice>, string, string]>([
    ['days ahead', {}, 'Due in 2 business days', 'Left: 2 business days'],
    ['one day ahead', { businessDaysLeft: 1 }, 'Due in 1 business day', 'Left: 1 business day'],
    [
      'on the day',
      { says: 'today', today: '2026-12-10', businessDaysLeft: 0 },
      'Due today, 5 pm MT',
      'Left: today is the last day',
    ],
    [
      'after the closing hour of the day',
      { says: 'missed', today: '2026-12-10', businessDaysLeft: 0 },
      'Missed',
      'Left: none: the hour has passed',
    ],
    [
      'days later',
      { says: 'missed', today: '2026-12-14', businessDaysLeft: -2 },
      'Missed',
      'Left: 2 business days past due',
    ],
    [
      'on the weekend after',
      { says: 'missed', dueOn: '2026-12-11', today: '2026-12-12', businessDaysLeft: 0 },
      'Missed',
      'Left: past due',
    ],
    [
      'on the day to start',
      { says: 'start' },
      'Start today, due Thu 10 Dec 2026',
      'Left: 2 business days',
    ],
    [
      'when theirs is late',
      { says: 'theirs_late', isOurs: false, today: '2026-12-11', businessDaysLeft: -1 },
      'Theirs is late',
      'Left: 1 business day past due',
    ],
    [
      'where no business day is left before a due Sunday',
      { dueOn: '2026-12-13', today: '2026-12-11', businessDaysLeft: 0 },
      'Due Sun 13 Dec 2026',
      'Left: no business day',
    ],
  ])('says how near it is: %s', (_, change, subject, left) => {
    const { subject: said, text } = clockNotice({ ...notice, ...change })
    expect(said).toBe(`${subject}: Return the signed study agreement, Juniper Flat`)
    expect(text).toContain(`\n${left}\n`)
  })

  it.each([
    ['a closing hour with its zone', '2026-12-11T00:00:00Z', 'Due: Thu 10 Dec 2026, 5 pm MT'],
    ['a day without an hour', null, 'Due: Thu 10 Dec 2026, to the end of the day'],
    [
      'a day that closes at midnight',
      '2026-12-11T07:00:00Z',
      'Due: Thu 10 Dec 2026, to the end of the day',
    ],
  ])('names %s', (_, dueAt, words) => {
    expect(clockNotice({ ...notice, dueAt }).text).toContain(words)
  })

  it('names who owes it, what follows, what to do first and where to acknowledge', () => {
    const { text } = clockNotice({ ...notice, firstAction: 'Sign it.', provisional: true })
    for (const words of [
      'We owe: Return the signed study agreement',
      'Project: Juniper Flat, request AVE-26C-014',
      'If it is missed: The request is withdrawn.',
      'First: Sign it.',
      'The date is provisional',
      'https://lineside.example/acknowledge/x',
    ])
      expect(text).toContain(words)
    expect(clockNotice({ ...notice, isOurs: false }).text).toContain('They owe: ')
  })

  it('keeps signs of a title out of the markup', () => {
    const { html } = clockNotice({ ...notice, title: '<b>Exhibit</b> & "D"' })
    expect(html).toContain('&lt;b&gt;Exhibit&lt;/b&gt; &amp; &quot;D&quot;')
    expect(html).not.toContain('<b>Exhibit')
  })
})

describe('the morning digest', () => {
  it.each([
    ['at 7 in the morning of the person', '2026-12-01T14:00:00Z', '2026-12-01'],
    ['not before', '2026-12-01T13:59:59Z', null],
    ['not after noon', '2026-12-01T19:00:00Z', null],
    ['not on a Saturday', '2026-12-05T15:00:00Z', null],
    ['not on Thanksgiving', '2026-11-26T15:00:00Z', null],
  ])('is due %s', (_, now, day) => {
    expect(digestDay(new Date(now), 'America/Denver')).toBe(day)
  })

  it.each([
    ['ours and past', 'applicant', true, -3, 'missed'],
    ['ours within ten business days', 'both', false, 10, 'near'],
    ['ours and farther', 'applicant', false, 11, null],
    ['theirs and late', 'operator', true, -1, 'theirs_late'],
    ['theirs and in time', 'operator', false, 1, null],
  ] as const)('lists what is %s', (_, party, isPast, businessDays, group) => {
    expect(digestGroup({ party, isPast, businessDays })).toBe(group)
  })

  it('puts what is missed first and counts the rest in its subject', () => {
    const line = { title: 'T', projectName: 'P', due: 'Thu 10 Dec 2026, 5 pm MT' }
    const { subject, text } = digestLetter({
      personName: 'Robin Vale',
      today: '2026-12-08',
      lines: [
        { ...line, group: 'near', left: '2 BD' },
        { ...line, group: 'missed', left: 'missed yesterday' },
      ],
      silentCount: 1,
      dueUrl: 'https://lineside.example/due',
    })
    expect(subject).toBe('Your clocks, Tue 8 Dec 2026: 1 missed, 1 near')
    expect(text.indexOf('missed yesterday: T, P')).toBeLessThan(text.indexOf('2 BD: T, P'))
    expect(text).toContain('1 more clock is acknowledged until a later day and not listed.')
  })
})
