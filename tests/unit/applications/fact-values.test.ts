import { describe, expect, it } from 'vitest'
import { asksWhy, fieldsOf, type StepChoice } from '@/components/applications/fact-shape'
import { factValuesOf } from '@/components/applications/fact-values'
import { centsOf, formatDollars } from '@/components/applications/money-words'
import type { FactKind } from '@/lib/domain/clocks/facts'

const ground = {
  id: '6ad1a4c2-4a3e-4f0e-9a10-0c1f3f4c7a11',
  atSeq: 4,
  zone: 'America/Denver',
}

function values(kind: FactKind, fields: Record<string, string>) {
  return factValuesOf((name) => fields[name] ?? '', { ...ground, kind, intent: { kind } })
}

const choice: StepChoice = {
  step: 'gate',
  instance: 1,
  title: 'Gate 2',
  status: 'open',
  isOurs: true,
  outcomes: [
    { key: 'proceed', title: 'Proceed' },
    { key: 'reduce', title: 'Reduce' },
  ],
  parts: [
    { key: 'deposit', title: 'Deposit', isMoney: true },
    { key: 'site', title: 'Site control', isMoney: false },
  ],
  evidence: null,
}

describe('a form as a fact', () => {
  it('leaves out what was left empty', () => {
    const { input, faults } = values('happened', { step: 'cure~2', receivedOn: '2026-11-30' })
    expect(faults).toEqual([])
    expect(input).toEqual({
      id: ground.id,
      kind: 'happened',
      atSeq: 4,
      step: 'cure',
      instance: 2,
      receivedOn: '2026-11-30',
    })
  })

  it('reads an hour in the zone of the utility, in summer and in winter', () => {
    const at = (receivedOn: string) =>
      values('happened', { receivedOn, receivedAt: '16:40' }).input.receivedAt
    expect(at('2026-11-30')).toBe('2026-11-30T23:40:00.000Z')
    expect(at('2026-07-01')).toBe('2026-07-01T22:40:00.000Z')
  })

  it('puts the hour on the day it was sent where no receipt is known', () => {
    const { input } = values('happened', { sentOn: '2026-11-30', receivedAt: '09:00' })
    expect(input.sentAt).toBe('2026-11-30T16:00:00.000Z')
    expect(input.receivedAt).toBeUndefined()
  })

  it('puts the hour of a booking on the booked day', () => {
    const { input } = values('scheduled', { dueOn: '2026-12-18', dueAt: '10:00' })
    expect(input.dueAt).toBe('2026-12-18T17:00:00.000Z')
  })

  it('names every field it cannot read, not the first alone', () => {
    const { faults } = values('changed', { 'terms.requestedMw': 'many', 'terms.dcMw': '6 or so' })
    expect(faults.map((fault) => fault.path)).toEqual(['terms.requestedMw', 'terms.dcMw'])
    expect(values('happened', { amountMinor: 'a lot' }).faults[0]?.path).toBe('amountMinor')
    expect(values('extension', { lengthDays: '1.5' }).faults[0]?.path).toBe('lengthDays')
  })

  it('takes terms as numbers and texts, thousands separated or not', () => {
    const fields = { 'terms.requestNo': 'AVE-1', 'terms.requestedMw': '1,048.5' }
    expect(values('changed', fields).input.terms).toEqual({
      requestNo: 'AVE-1',
      requestedMw: 1048.5,
    })
  })

  it('keeps the kind and the pointer of a correction', () => {
    const intent = { kind: 'correction' as const, replaces: 'one', step: 'cure', instance: 1 }
    const { input } = factValuesOf(() => '', { ...ground, kind: 'happened', intent })
    expect(input).toMatchObject({ kind: 'correction', replaces: 'one', step: 'cure', instance: 1 })
  })
})

describe('what a form asks for', () => {
  const shown = (kind: FactKind, obligation = '', decision = '') =>
    fieldsOf(kind, { choice, obligation, decision })

  it('asks how a step ended only for the whole step, and for money only where money is owed', () => {
    expect(shown('happened')).toContain('outcome')
    expect(shown('happened')).not.toContain('amount')
    expect(shown('happened', 'deposit')).toContain('amount')
    expect(shown('happened', 'deposit')).not.toContain('outcome')
    expect(shown('happened', 'site')).not.toContain('amount')
  })

  it('asks for no new date where an extension was refused', () => {
    expect(shown('extension', '', 'granted')).toContain('dueOn')
    expect(shown('extension', '', 'refused')).not.toContain('dueOn')
  })

  it('asks only for the reason of a retraction', () => {
    expect(shown('retraction')).toEqual([])
  })

  it('asks why a step is recorded before what it follows', () => {
    expect(asksWhy('happened', { ...choice, status: 'waiting' })).toBe(true)
    expect(asksWhy('happened', choice)).toBe(false)
    expect(asksWhy('scheduled', { ...choice, status: 'waiting' })).toBe(false)
  })
})

describe('amounts in dollars', () => {
  it.each([
    ['206,000', 20600000],
    ['$206000', 20600000],
    ['1250.5', 125050],
    ['0.07', 7],
  ])('reads %s in cents', (text, cents) => {
    expect(centsOf(text)).toBe(cents)
  })

  it.each(['', 'abc', '12,34', '1.234', '-5', '2e5'])('refuses "%s"', (text) => {
    expect(centsOf(text)).toBeNull()
  })

  it('shows cents only where there are some', () => {
    expect(formatDollars(20600000)).toBe('$206,000')
    expect(formatDollars(125050)).toBe('$1,250.50')
  })
})
