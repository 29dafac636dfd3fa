import type { MoneyRule } from '@/lib/domain/clocks/procedure'

/** Money of the cluster process. Amounts in minor units. */

/** The account on which readiness deposits of all gates count together. */
export const readinessAccount = 'readiness'

/** Source: Order 2023-A table (read in a quotation); LGIP 3.1.1.1. The edges from memory. */
export const studyDeposit: MoneyRule = {
  kind: 'bracketed',
  brackets: [
    { belowMw: 80, plusMinor: 3_500_000, perMwMinor: 100_000 },
    { belowMw: 200, plusMinor: 15_000_000 },
    { plusMinor: 25_000_000 },
  ],
}

/** Twice the study deposit. Source: LGIP 3.4.2(vi) (from memory). */
export const readinessAtRequest: MoneyRule = { kind: 'multiple', times: 2, of: studyDeposit }

/** $10,000 per MW from $500,000 to $2,000,000. Source: LGIP 3.4.2(iii) (from memory). */
export const depositInLieuOfLand: MoneyRule = {
  kind: 'per_mw',
  perMwMinor: 1_000_000,
  atLeastMinor: 50_000_000,
  atMostMinor: 200_000_000,
}

/** $10,000 and $1 per kWac. Source: South Carolina pattern, read in a state procedure. */
export const cooperativeStudyDeposit: MoneyRule = {
  kind: 'per_kw',
  perKwMinor: 100,
  plusMinor: 1_000_000,
}

/** The total of readiness deposit and agreement deposit by gate, percent of assigned cost. */
export const gatePercents = { gate1: 5, gate2: 10, gate3: 20 }
