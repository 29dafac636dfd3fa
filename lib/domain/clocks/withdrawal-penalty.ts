import { percentOf, roseBy, sayDollars } from '@/lib/domain/money'

/** How far a cluster request had come when it was withdrawn. */
export const withdrawalStages = [
  'before_study',
  'cluster_study',
  'restudy',
  'facilities_study',
  'agreement',
] as const
export type WithdrawalStage = (typeof withdrawalStages)[number]

/** All amounts in minor units. */
export interface WithdrawalInput {
  studyDepositMinor: number
  /** The actual study cost allocated to the request; needed during and after the cluster study. */
  allocatedStudyCostMinor: number | null
  /** Network upgrade cost assigned by the latest study; needed from the restudy on. */
  assignedMinor: number | null
  /** The same by the study before: the report before a restudy, or the cluster report. */
  previousAssignedMinor?: number | null
  /** The study that assigned the latest cost, which decides what rise frees from the penalty. */
  assignedBy?: 'cluster' | 'facilities'
  /** The gate after that study was passed with it: the rise no longer frees. */
  riseAccepted?: boolean
  /** False: the withdrawal costs or delays no request of the same or a lower position. */
  materialEffect?: boolean
}

export interface PenaltyRules {
  /** Times the allocated study cost during or after the cluster study. */
  studyCostTimes: number
  /** Percent of assigned cost by stage. */
  percent: Record<'restudy' | 'facilities_study' | 'agreement', number>
  /** The study deposit is the least that is paid. */
  depositIsFloor: boolean
  /** A rise of at least this percent in a cluster study or restudy frees. */
  clusterRisePercent: number
  /** A rise of more than this percent from the cluster report to the facilities study frees. */
  facilitiesRisePercent: number
}

/** Source: pro forma LGIP 3.7.1 after Order 2023 (from memory; the floor with less confidence). */
export const federalPenaltyRules: PenaltyRules = {
  studyCostTimes: 2,
  percent: { restudy: 5, facilities_study: 10, agreement: 20 },
  depositIsFloor: true,
  clusterRisePercent: 25,
  facilitiesRisePercent: 100,
}

export interface WithdrawalPenalty {
  /** Null while what it hangs on is not known. */
  penaltyMinor: number | null
  exempt: 'before_study' | 'no_material_effect' | 'cluster_rise' | 'facilities_rise' | null
  /** How it comes out, in words that can be checked by hand. */
  account: string
}

/**
 * What a cluster request pays for withdrawing at a stage: the greater of its study deposit and
 * the step of the ladder, unless an exemption holds.
 *
 * `cluster_study`: during it or after its report, before a restudy or the facilities study.
 * `restudy`: during or after a restudy, before the facilities study. `facilities_study`: during
 * or after it, before the agreement is signed or its unsigned filing asked. `agreement`: after.
 *
 * Source: pro forma LGIP 3.7.1 after Order 2023 (from memory); a tariff may carry other multiples.
 */
export function withdrawalPenalty(
  stage: WithdrawalStage,
  input: WithdrawalInput,
  rules: PenaltyRules = federalPenaltyRules,
): WithdrawalPenalty {
  const free = exemption(stage, input, rules)
  if (free) return { penaltyMinor: 0, ...free }
  const rung = ladder(stage, input, rules)
  if (rung.amountMinor === null) return { penaltyMinor: null, exempt: null, account: rung.words }
  const { studyDepositMinor } = input
  if (!rules.depositIsFloor)
    return { penaltyMinor: rung.amountMinor, exempt: null, account: `${rung.words}.` }
  const penaltyMinor = Math.max(studyDepositMinor, rung.amountMinor)
  const deposit = `the study deposit of ${sayDollars(studyDepositMinor)}`
  const account = `The greater of ${deposit} and ${rung.words}: ${sayDollars(penaltyMinor)}.`
  return { penaltyMinor, exempt: null, account }
}

type Freed = Pick<WithdrawalPenalty, 'exempt' | 'account'>

function exemption(
  stage: WithdrawalStage,
  input: WithdrawalInput,
  rules: PenaltyRules,
): Freed | null {
  if (stage === 'before_study')
    return { exempt: 'before_study', account: 'No penalty: the cluster study has not begun.' }
  if (input.materialEffect === false)
    return {
      exempt: 'no_material_effect',
      account:
        'No penalty: no effect on cost or timing of requests of the same or a lower position.',
    }
  return input.riseAccepted ? null : riseExemption(input, rules)
}

function riseExemption(input: WithdrawalInput, rules: PenaltyRules): Freed | null {
  const { assignedMinor: to, previousAssignedMinor: from, assignedBy = 'cluster' } = input
  if (to === null || from === null || from === undefined || from <= 0) return null
  const moved = `assigned cost went from ${sayDollars(from)} to ${sayDollars(to)} (${riseWords(from, to)})`
  if (assignedBy === 'cluster') {
    const bar = rules.clusterRisePercent
    return roseBy(from, to, bar, 'at_least')
      ? { exempt: 'cluster_rise', account: `No penalty: ${moved}, at least ${bar} %.` }
      : null
  }
  const bar = rules.facilitiesRisePercent
  return roseBy(from, to, bar, 'over')
    ? { exempt: 'facilities_rise', account: `No penalty: ${moved}, more than ${bar} %.` }
    : null
}

/** `+31.0 %`, cut and never rounded up, so that it cannot seem to pass the bar. */
function riseWords(from: number, to: number): string {
  const tenths = Number(((BigInt(to) - BigInt(from)) * 1000n) / BigInt(from))
  return `${tenths < 0 ? '−' : '+'}${(Math.abs(tenths) / 10).toFixed(1)} %`
}

function ladder(
  stage: WithdrawalStage,
  input: WithdrawalInput,
  rules: PenaltyRules,
): { amountMinor: number | null; words: string } {
  if (stage === 'cluster_study' || stage === 'before_study') {
    const cost = input.allocatedStudyCostMinor
    if (cost === null)
      return { amountMinor: null, words: 'The allocated study cost is not recorded.' }
    const amountMinor = cost * rules.studyCostTimes
    const words = `${rules.studyCostTimes} × the allocated study cost of ${sayDollars(cost)} = ${sayDollars(amountMinor)}`
    return { amountMinor, words }
  }
  const assigned = input.assignedMinor
  if (assigned === null) return { amountMinor: null, words: 'No assigned cost is recorded.' }
  const percent = rules.percent[stage]
  const amountMinor = percentOf(assigned, percent, 'nearest')
  const words = `${percent} % of ${sayDollars(assigned)} assigned = ${sayDollars(amountMinor)}`
  return { amountMinor, words }
}

export interface WithdrawalRefund {
  /** What is expected back, minor units; never below nothing. */
  refundMinor: number
  /** What is owed beyond the deposits held. */
  owedMinor: number
  account: string
}

/**
 * What comes back after a withdrawal: the study deposit less the study cost, and the readiness
 * deposit less the penalty. The application fee does not. Minor units.
 */
export function refundAfterWithdrawal(held: {
  studyDepositMinor: number
  studyCostMinor: number
  readinessMinor: number
  penaltyMinor: number
}): WithdrawalRefund {
  const study = held.studyDepositMinor - held.studyCostMinor
  const readiness = held.readinessMinor - held.penaltyMinor
  const net = study + readiness
  const part = (from: number, less: number) => `(${sayDollars(from)} − ${sayDollars(less)})`
  const account = `${part(held.studyDepositMinor, held.studyCostMinor)} + ${part(held.readinessMinor, held.penaltyMinor)} = ${sayDollars(net)}.`
  return { refundMinor: Math.max(0, net), owedMinor: Math.max(0, -net), account }
}
