import { describe, expect, it } from 'vitest'
import { federalFastTrack } from '@/lib/domain/clocks/library/fast-track'
import { closingInstant, localOf } from '@/lib/domain/clocks/zoned'
import { itemOf, on, partiesOf, told } from './told'

const mountain = 'America/Denver'

describe('the closing hour', () => {
  it.each([
    ['on the Friday before clocks go forward', '2026-03-06', '17:00', '2026-03-07T00:00:00.000Z'],
    ['on the Monday after clocks went forward', '2026-03-09', '17:00', '2026-03-09T23:00:00.000Z'],
    ['on the Friday before clocks go back', '2026-10-30', '17:00', '2026-10-30T23:00:00.000Z'],
    ['on the Monday after clocks went back', '2026-11-02', '17:00', '2026-11-03T00:00:00.000Z'],
    [
      'skipped by the change moves forward with it',
      '2026-03-08',
      '02:30',
      '2026-03-08T09:30:00.000Z',
    ],
    ['that comes twice is the first', '2026-11-01', '01:30', '2026-11-01T07:30:00.000Z'],
    [
      'left out is the next midnight, on a day of 23 hours',
      '2026-03-08',
      null,
      '2026-03-09T06:00:00.000Z',
    ],
    [
      'left out is the next midnight, on a day of 25 hours',
      '2026-11-01',
      null,
      '2026-11-02T07:00:00.000Z',
    ],
  ])('%s', (_, day, closesAt, instant) => {
    expect(closingInstant(day, closesAt, mountain)).toBe(instant)
  })

  it('is refused in a zone that is none', () => {
    expect(() => closingInstant('2026-03-06', '17:00', 'America/Nowhere')).toThrow(/no instant/)
  })

  it('an instant has the date and hour of the zone asked', () => {
    expect(localOf('2026-11-17T00:20:00Z', mountain)).toEqual({
      on: '2026-11-16',
      time: '17:20:00',
    })
    expect(localOf('2026-11-17T00:20:00Z', 'America/New_York').time).toBe('19:20:00')
  })
})

describe('a filing at the closing hour', () => {
  const filed = (receivedAt: string, receivedOn: string, key: 'ave' | 'cbto' = 'ave') =>
    itemOf(
      federalFastTrack(),
      partiesOf(key),
      told({ step: 'file', outcome: 'filed', receivedAt, receivedOn }),
      'completeness',
    ).dueOn

  it.each([
    ['on the stroke of it is in time', '2026-03-07T00:00:00Z', '2026-03-06', '2026-03-20'],
    [
      'a second later is received the next business day',
      '2026-03-07T00:00:01Z',
      '2026-03-06',
      '2026-03-23',
    ],
    [
      'on the Monday after clocks went forward, in time',
      '2026-03-09T23:00:00Z',
      '2026-03-09',
      '2026-03-23',
    ],
    ['on that Monday, a second late', '2026-03-09T23:00:01Z', '2026-03-09', '2026-03-24'],
    [
      'on the Monday after clocks went back, in time',
      '2026-11-03T00:00:00Z',
      '2026-11-02',
      '2026-11-17',
    ],
    ['on that Monday, a second late', '2026-11-03T00:00:01Z', '2026-11-02', '2026-11-18'],
    [
      'on a Saturday at any hour is received on Monday',
      '2026-03-07T17:00:00Z',
      '2026-03-07',
      '2026-03-23',
    ],
    ['on a Saturday night too', '2026-03-08T04:00:00Z', '2026-03-07', '2026-03-23'],
  ])('%s', (_, at, day, dueOn) => {
    expect(filed(at, day)).toBe(dueOn)
  })

  it('does not move day 1 where an event after hours counts as that day', () => {
    expect(filed('2026-03-06T23:30:00Z', '2026-03-06', 'cbto')).toBe('2026-03-20')
  })

  it('without an hour counts as in time', () => {
    const facts = told(on('2026-03-06', 'file', 'filed'))
    expect(itemOf(federalFastTrack(), partiesOf('ave'), facts, 'completeness').dueOn).toBe(
      '2026-03-20',
    )
  })

  it('known by its instant alone gets the date of the utility', () => {
    const facts = told({ step: 'file', outcome: 'filed', receivedAt: '2026-03-07T00:00:00Z' })
    const item = itemOf(federalFastTrack(), partiesOf('ave'), facts, 'file')
    expect(item.doneOn).toBe('2026-03-06')
  })
})

describe('done on the due date', () => {
  const start = [on('2026-09-28', 'file', 'filed'), on('2026-10-09', 'completeness', 'deficient')]
  const cured = (receivedAt?: string) =>
    itemOf(
      federalFastTrack(),
      partiesOf('ave'),
      told(...start, on('2026-10-26', 'cure', 'supplied', { receivedAt })),
      'cure',
    )

  it('without an hour is in time, and says that the hour is not recorded', () => {
    const item = cured()
    expect(item.dueOn).toBe('2026-10-26')
    expect(item.doneLate).toBe(false)
    expect(item.hourRecorded).toBe(false)
    expect(item.derivation.map((line) => line.text).join(' ')).toContain('hour not recorded')
  })

  it.each([
    ['at the closing hour is in time', '2026-10-26T23:00:00Z', false],
    ['a second past the closing hour is late', '2026-10-26T23:00:01Z', true],
  ])('%s', (_, at, late) => {
    expect(cured(at).doneLate).toBe(late)
    expect(cured(at).hourRecorded).toBe(true)
  })

  it('is judged by our count, whatever earlier date the utility states', () => {
    const facts = told(
      ...start,
      { kind: 'stated', step: 'cure', dueOn: '2026-10-23' },
      on('2026-10-26', 'cure', 'supplied', { receivedAt: '2026-10-26T16:00:00Z' }),
    )
    expect(itemOf(federalFastTrack(), partiesOf('ave'), facts, 'cure').doneLate).toBe(false)
  })
})
