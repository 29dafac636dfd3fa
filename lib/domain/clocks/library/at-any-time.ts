import type { ClockRule, Step } from '@/lib/domain/clocks/procedure'
import { noticeDuty, sources, stepWith } from '@/lib/domain/clocks/library/step-of'

const sgip = sources('Pro forma SGIP')
const sgia = sources('Pro forma SGIA')

/** A modification that is not agreed, and a dispute: SG-10 and SG-12. */
export function objections(): Step[] {
  return [
    stepWith({
      key: 'modification_notice',
      title: 'Notice that a modification is not agreed',
      short: 'Modification',
      stage: 'Request',
      party: 'operator',
      kind: 'anytime',
      outcomes: [{ key: 'given', title: 'Notice given' }],
      source: sgip.memory('SG-10', '1.4'),
    }),
    stepWith({
      key: 'modification_cure',
      title: 'Cure the modification',
      stage: 'Request',
      party: 'applicant',
      kind: 'recurring',
      start: { mode: 'all', of: [{ step: 'modification_notice' }] },
      outcomes: [{ key: 'cured', title: 'Taken back or agreed in writing' }],
      onMiss: {
        effect: 'withdrawn_on_notice',
        say: 'It may be treated as a withdrawal; a new request may be needed.',
        first: 'Ask in writing by when it must be cured.',
      },
      source: sgip.memory('SG-10', '1.4', 'high', 'A reasonable time; no number.'),
    }),
    stepWith({
      key: 'dispute_notice',
      title: 'Notice of dispute',
      short: 'Dispute',
      stage: 'Request',
      party: 'both',
      kind: 'anytime',
      outcomes: [{ key: 'given', title: 'Notice given' }],
      source: sgip.memory('SG-12', '4.2'),
    }),
    stepWith({
      key: 'dispute_settled',
      title: 'Settle the dispute',
      stage: 'Request',
      party: 'both',
      kind: 'recurring',
      start: { mode: 'all', of: [{ step: 'dispute_notice' }] },
      clocks: [{ length: 2, unit: 'business_day' }],
      outcomes: [{ key: 'settled', title: 'Settled, or taken to the dispute service' }],
      onMiss: {
        effect: 'duty',
        say: 'Either party may turn to the dispute resolution service.',
        first: 'Decide whether to turn to it.',
      },
      source: sgip.memory('SG-12', '4.2'),
    }),
  ]
}

interface AccountNames {
  key: string
  title: string
  stage: string
  clock: ClockRule
  source: Step['source']
}

/** An account of a study or review, then an invoice above the deposit or a refund below it. */
export function accountSteps({ key, title, stage, clock, source }: AccountNames): Step[] {
  const account = `${key}_account`
  const follows = (outcome: string): Partial<Step> => ({
    kind: 'recurring',
    needs: { outcome: account, in: [outcome] },
    start: { mode: 'all', of: [{ step: account, outcome: [outcome] }] },
    clocks: [clock],
  })
  return [
    stepWith({
      key: account,
      title: `Account of the ${title}`,
      short: 'Account',
      stage,
      party: 'operator',
      kind: 'anytime',
      outcomes: [
        { key: 'invoice', title: 'Invoice above the deposit' },
        { key: 'refund', title: 'Deposit above the cost' },
      ],
      source,
    }),
    stepWith({
      ...follows('invoice'),
      key: `${key}_invoice`,
      title: `Pay the cost of the ${title} above the deposit`,
      short: 'Invoice paid',
      stage,
      party: 'applicant',
      outcomes: [{ key: 'paid', title: 'Paid or disputed' }],
      onMiss: {
        effect: 'withdrawn_on_notice',
        say: 'Default.',
        first: 'Pay, or dispute the invoice in writing.',
      },
      source,
    }),
    stepWith({
      ...follows('refund'),
      key: `${key}_refund`,
      title: `Refund the excess deposit of the ${title}`,
      short: 'Refund',
      stage,
      party: 'operator',
      outcomes: [{ key: 'refunded', title: 'Refunded, without interest' }],
      onMiss: noticeDuty,
      source,
    }),
  ]
}

/** Monthly bills and defaults under the agreement: SG-73 and SG-80. */
export function underTheAgreement(clock: Pick<ClockRule, 'roll'>): Step[] {
  return [
    stepWith({
      key: 'bill',
      title: 'Monthly bill',
      short: 'Bill',
      stage: 'Construction',
      party: 'operator',
      kind: 'anytime',
      outcomes: [{ key: 'billed', title: 'Billed' }],
      source: sgia.memory('SG-73', '6.1.1'),
    }),
    stepWith({
      key: 'bill_paid',
      title: 'Pay the bill',
      short: 'Bill paid',
      stage: 'Construction',
      party: 'applicant',
      kind: 'recurring',
      start: { mode: 'all', of: [{ step: 'bill' }] },
      clocks: [{ length: 30, unit: 'calendar_day', ...clock }],
      outcomes: [{ key: 'paid', title: 'Paid' }],
      onMiss: { effect: 'cure', say: 'Default; notice and cure follow.', first: 'Pay today.' },
      source: sgia.memory('SG-73', '6.1.1'),
    }),
    stepWith({
      key: 'default_notice',
      title: 'Notice of default',
      stage: 'Construction',
      party: 'operator',
      kind: 'anytime',
      outcomes: [{ key: 'given', title: 'Notice given' }],
      source: sgia.adapted('SG-80', '7.6'),
    }),
    stepWith({
      key: 'default_cure',
      title: 'Cure the default',
      stage: 'Construction',
      party: 'applicant',
      kind: 'recurring',
      start: { mode: 'all', of: [{ step: 'default_notice' }] },
      clocks: [{ length: 60, unit: 'calendar_day', ...clock }],
      outcomes: [{ key: 'cured', title: 'Cured' }],
      onMiss: {
        effect: 'withdrawn_on_notice',
        say: 'The other party may end the agreement.',
        first: 'Cure, or show in writing that the cure has begun.',
      },
      source: sgia.adapted(
        'SG-80',
        '7.6',
        'Not curable in 60 calendar days: begin within 20 calendar days of the notice and finish within 6 months of it.',
      ),
    }),
  ]
}
