import type { ClusterRules } from '@/lib/domain/clocks/library/cluster-options'
import { sources, stepWith } from '@/lib/domain/clocks/library/step-of'
import type { ObligationRule, Step } from '@/lib/domain/clocks/procedure'

const lgip = sources('Pro forma LGIP after Order 2023')
const section = '9'
const memory = (id: string, note?: string) => lgip.memory(id, section, 'medium', note)
const willStudy: Step['needs'] = { outcome: 'affected_answer', in: ['will_study'] }
const theirs = { stage: 'Affected system', party: 'affected_system' as const }

/** In the round of a restudy: whether the affected system waits for it, LG-51. */
export const affectedWait: Step = stepWith({
  ...theirs,
  key: 'affected_wait',
  title: 'Affected system says whether it waits for the restudy',
  short: 'Waits or not',
  needs: { all: [willStudy, { outcome: 'restudy_decision', in: ['restudy'] }] },
  start: { mode: 'all', of: [{ step: 'restudy_decision', outcome: ['restudy'] }] },
  clocks: [{ length: 5, unit: 'business_day' }],
  outcomes: [
    { key: 'waits', title: 'Waits for the restudy' },
    { key: 'goes_on', title: 'Goes on' },
  ],
  overtakenBy: ['affected_schedule'],
  source: memory('LG-51', 'Waiting until the restudy is reported complete is allowed (read).'),
})

/** The study of an affected system, by its own calendar and hour: LG-50 and LG-52 to LG-58. */
export function affectedSystem(rules: ClusterRules): Step[] {
  return [...untilTender, ...agreement(rules), ...study(rules), ...affectedRestudy(rules)]
}

const untilTender: Step[] = [
  stepWith({
    ...theirs,
    key: 'affected_answer',
    title: 'Affected system says whether it will study',
    short: 'Studies or not',
    needs: { outcome: 'affected_notice', in: ['told'] },
    start: { mode: 'all', of: [{ step: 'affected_notice', outcome: ['told'] }] },
    clocks: [{ length: 20, unit: 'business_day' }],
    outcomes: [
      { key: 'will_study', title: 'Will study' },
      { key: 'will_not', title: 'Will not study' },
    ],
    overtakenBy: ['affected_schedule', 'affected_tender'],
    source: memory('LG-50'),
  }),
  stepWith({
    ...theirs,
    key: 'affected_schedule',
    title: 'Affected system shares its schedule',
    short: 'Schedule',
    needs: willStudy,
    start: { mode: 'all', of: [{ step: 'affected_answer', outcome: ['will_study'] }] },
    clocks: [{ length: 15, unit: 'business_day' }],
    outcomes: [{ key: 'shared', title: 'Shared' }],
    overtakenBy: ['affected_tender'],
    source: memory('LG-52'),
  }),
  stepWith({
    ...theirs,
    key: 'affected_tender',
    title: 'Affected system tenders its study agreement',
    short: 'Agreement tendered',
    needs: willStudy,
    start: { mode: 'all', of: [{ step: 'affected_schedule' }] },
    clocks: [{ length: 10, unit: 'business_day' }],
    outcomes: [{ key: 'sent', title: 'Agreement sent' }],
    source: memory('LG-53'),
  }),
]

function agreement(rules: ClusterRules): Step[] {
  const ours = { stage: 'Affected system', party: 'applicant' as const, to: theirs.party }
  const amountMinor = rules.affectedDepositMinor
  const deposit: ObligationRule = {
    key: 'deposit',
    title: 'Study deposit of the affected system',
    what: 'money',
    leadBusinessDays: rules.depositLeadDays,
    ...(amountMinor !== null && { target: { kind: 'fixed', amountMinor } }),
  }
  return [
    stepWith({
      ...ours,
      key: 'affected_agreement',
      title: 'Sign the affected system study agreement',
      short: 'Agreement signed',
      needs: willStudy,
      start: { mode: 'all', of: [{ step: 'affected_tender' }] },
      clocks: [{ length: 10, unit: 'business_day' }],
      obligations: [
        { key: 'agreement', title: 'Signed agreement', what: 'document' },
        { key: 'data', title: 'Technical data', what: 'data', owner: 'engineer' },
        deposit,
      ],
      outcomes: [{ key: 'signed', title: 'Signed, with deposit and data' }],
      onMiss: {
        effect: 'duty',
        say: 'Their study does not start.',
        first: 'Call their studies desk and send the agreement with the deposit.',
      },
      source: memory('LG-54'),
    }),
    stepWith({
      ...theirs,
      key: 'affected_check',
      title: 'Affected system tells what is deficient',
      short: 'Data check',
      needs: willStudy,
      start: { mode: 'all', of: [{ step: 'affected_agreement' }] },
      clocks: [{ length: 5, unit: 'business_day' }],
      outcomes: [
        { key: 'in_order', title: 'In order' },
        { key: 'deficient', title: 'Deficient' },
      ],
      overtakenBy: ['affected_study'],
      source: memory('LG-54'),
    }),
    stepWith({
      ...ours,
      key: 'affected_cure',
      title: 'Cure what the affected system found deficient',
      short: 'Cure',
      owner: 'engineer',
      needs: { outcome: 'affected_check', in: ['deficient'] },
      start: { mode: 'all', of: [{ step: 'affected_check', outcome: ['deficient'] }] },
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [{ key: 'supplied', title: 'Supplied' }],
      onMiss: {
        effect: 'duty',
        say: 'Their study does not start.',
        first: 'Send what is ready and ask for the rest of the time in writing.',
      },
      source: memory('LG-54'),
    }),
  ]
}

function study(rules: ClusterRules): Step[] {
  return [
    stepWith({
      ...theirs,
      key: 'affected_study',
      title: 'Affected system study',
      short: 'Affected system study',
      needs: willStudy,
      start: { mode: 'all', of: [{ step: 'affected_agreement' }] },
      clocks: [rules.calendarDays(150)],
      outcomes: [{ key: 'given', title: 'Report given' }],
      onMiss: rules.late('$2,000'),
      evidence: 'Report with the upgrades of the affected system',
      typical: { shortest: 150, likely: 170, longest: 240 },
      source: memory('LG-55', 'Counted from the receipt of the signed agreement.'),
    }),
    stepWith({
      ...theirs,
      key: 'affected_meeting',
      title: 'Affected system results meeting',
      short: 'Results meeting',
      needs: willStudy,
      start: { mode: 'all', of: [{ step: 'affected_study' }] },
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [{ key: 'held', title: 'Held' }],
      source: memory('LG-56'),
    }),
    stepWith({
      ...theirs,
      key: 'affected_construction',
      title: 'Affected system tenders its facilities construction agreement',
      short: 'Construction agreement',
      needs: willStudy,
      start: { mode: 'all', of: [{ step: 'affected_study' }] },
      clocks: [rules.calendarDays(30)],
      outcomes: [
        { key: 'sent', title: 'Agreement sent' },
        { key: 'none', title: 'Nothing to build' },
      ],
      source: memory('LG-57'),
    }),
  ]
}

function affectedRestudy(rules: ClusterRules): Step[] {
  return [
    stepWith({
      ...theirs,
      key: 'affected_restudy_notice',
      title: 'Affected system gives notice of a restudy',
      short: 'Restudy notice',
      kind: 'anytime',
      outcomes: [{ key: 'given', title: 'Notice given' }],
      source: memory('LG-58'),
    }),
    stepWith({
      ...theirs,
      key: 'affected_restudy',
      title: 'Affected system restudy',
      short: 'Affected restudy',
      kind: 'recurring',
      start: { mode: 'all', of: [{ step: 'affected_restudy_notice' }] },
      clocks: [rules.calendarDays(60)],
      outcomes: [{ key: 'given', title: 'Report given' }],
      source: memory('LG-58'),
    }),
  ]
}
