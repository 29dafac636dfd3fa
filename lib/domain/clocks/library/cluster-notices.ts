import type { ClusterRules } from '@/lib/domain/clocks/library/cluster-options'
import { sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type { ClockRule, Consequence, RuleSource, Step } from '@/lib/domain/clocks/procedure'

const lgip = sources('Pro forma LGIP after Order 2023')

interface NoticePair {
  key: string
  notice: string
  answerKey: string
  answer: string
  short: string
  answered: string
  clock: ClockRule
  onMiss: Consequence
  source: RuleSource
}

/** What may come at any time, and our clock from it: LG-13, LG-36 and LG-37. */
export function clusterNotices(rules: ClusterRules): Step[] {
  return [
    ...pair({
      key: 'withdrawal_notice',
      notice: 'Notice of withdrawal',
      answerKey: 'withdrawal_cure',
      answer: 'Cure what the notice of withdrawal names',
      short: 'Withdrawal cure',
      answered: 'Cured, or dispute process announced',
      clock: { length: rules.noticeCureDays, unit: 'business_day' },
      onMiss: withdrawn('Cure it, or write that the dispute process will be used, today.'),
      source: lgip.memory('LG-36', '3.7'),
    }),
    ...pair({
      key: 'land_notice',
      notice: 'Notice that site control has lapsed',
      answerKey: 'land_shown',
      answer: 'Show site control again',
      short: 'Site control',
      answered: 'Shown',
      clock: { length: 10, unit: 'business_day' },
      onMiss: {
        effect: 'withdrawn_on_notice',
        say: 'Withdrawn under 3.7, on their notice with its cure.',
        first: 'Send the lease or option, or ask which parcel is in question.',
      },
      source: lgip.memory('LG-13', '3.4.2(iii)', 'medium'),
    }),
    ...pair({
      key: 'study_invoice',
      notice: 'Study invoice beyond the deposit',
      answerKey: 'study_invoice_paid',
      answer: 'Pay the study invoice',
      short: 'Invoice paid',
      answered: 'Paid or disputed',
      clock: rules.calendarDays(30),
      onMiss: {
        effect: 'withdrawn_on_notice',
        say: 'Default; the request may be withdrawn.',
        first: 'Pay, or dispute the invoice in writing.',
      },
      source: lgip.memory('LG-37', '13.3'),
    }),
  ]
}

function pair(given: NoticePair): Step[] {
  const { key, source } = given
  return [
    stepWith({
      key,
      title: given.notice,
      stage: 'Request',
      party: 'operator',
      kind: 'anytime',
      outcomes: [{ key: 'given', title: 'Given' }],
      source,
    }),
    stepWith({
      key: given.answerKey,
      title: given.answer,
      short: given.short,
      stage: 'Request',
      party: 'applicant',
      kind: 'recurring',
      start: { mode: 'all', of: [{ step: key }] },
      clocks: [given.clock],
      outcomes: [{ key: 'done', title: given.answered }],
      onMiss: given.onMiss,
      source,
    }),
  ]
}
