import { readinessAccount } from '@/lib/domain/clocks/library/cluster-money'
import type { ClusterRules } from '@/lib/domain/clocks/library/cluster-options'
import { sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type { Step } from '@/lib/domain/clocks/procedure'

const lgip = sources('Pro forma LGIP after Order 2023')
const stage = 'Agreement'

/** Draft, negotiation, gate 3 and filing of the interconnection agreement: LG-29 to LG-35. */
export function clusterAgreement(rules: ClusterRules): Step[] {
  return [
    stepWith({
      key: 'lgia_draft',
      title: 'Tender the draft interconnection agreement',
      short: 'Draft agreement',
      stage,
      party: 'operator',
      start: { mode: 'all', of: [{ step: 'draft_comments' }] },
      clocks: [rules.calendarDays(30)],
      outcomes: [{ key: 'sent', title: 'Draft and appendices sent' }],
      evidence: 'Draft agreement with appendices',
      typical: { shortest: 30, likely: 30, longest: 45 },
      source: lgip.memory('LG-29', '11.1'),
    }),
    stepWith({
      key: 'appendices',
      title: 'Return the completed appendices',
      short: 'Appendices',
      stage,
      party: 'applicant',
      start: { mode: 'all', of: [{ step: 'lgia_draft' }] },
      clocks: [rules.calendarDays(30)],
      outcomes: [{ key: 'returned', title: 'Returned' }],
      onMiss: {
        effect: 'duty',
        say: 'No consequence of its own; the time to sign runs on.',
        first: 'Return them: the negotiation stands still without.',
      },
      overtakenBy: ['gate_3'],
      source: lgip.memory('LG-30', '11.1', 'medium'),
    }),
    ...negotiation(rules),
    gateThree(rules),
    stepWith({
      key: 'agreement_filed',
      title: 'File the agreement at FERC',
      short: 'Agreement filed',
      stage,
      party: 'operator',
      start: { mode: 'all', of: [{ step: 'gate_3', outcome: ['signed', 'unsigned_filing'] }] },
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [{ key: 'filed', title: 'Filed' }],
      source: lgip.memory('LG-35', '11.3'),
    }),
  ]
}

function negotiation(rules: ClusterRules): Step[] {
  return [
    stepWith({
      key: 'negotiation',
      title: 'Negotiate the agreement',
      short: 'Negotiation',
      stage,
      party: 'both',
      start: { mode: 'all', of: [{ step: 'final_report', date: 'sent' }] },
      clocks: [rules.calendarDays(60, { fromDayItself: true })],
      outcomes: [
        { key: 'agreed', title: 'Agreed' },
        { key: 'impasse', title: 'Ended without agreement' },
      ],
      onMiss: {
        effect: 'duty',
        say: 'The time to negotiate is over.',
        first: 'Sign, ask for the unsigned filing, or start the dispute process.',
      },
      overtakenBy: ['gate_3'],
      source: lgip.memory('LG-31', '11.2'),
    }),
    stepWith({
      key: 'impasse_choice',
      title: 'Ask for the unsigned filing or start a dispute',
      short: 'After the impasse',
      stage,
      party: 'applicant',
      needs: { outcome: 'negotiation', in: ['impasse'] },
      start: { mode: 'all', of: [{ step: 'negotiation', outcome: ['impasse'] }] },
      clocks: [rules.calendarDays(60)],
      outcomes: [
        { key: 'unsigned_filing', title: 'Unsigned filing asked for' },
        { key: 'dispute', title: 'Dispute process started' },
      ],
      onMiss: withdrawn('Ask for the unsigned filing in writing before the hour closes.'),
      overtakenBy: ['gate_3'],
      source: lgip.memory('LG-31', '11.2'),
    }),
    stepWith({
      key: 'final_agreement',
      title: 'Tender the final agreement',
      short: 'Final agreement',
      stage,
      party: 'operator',
      start: { mode: 'all', of: [{ step: 'negotiation' }] },
      clocks: [{ length: 15, unit: 'business_day' }],
      outcomes: [{ key: 'sent', title: 'Final agreement sent' }],
      overtakenBy: ['gate_3'],
      source: lgip.memory('LG-33', '11.2'),
    }),
  ]
}

function gateThree(rules: ClusterRules): Step {
  const fromDraft = rules.signFrom === 'draft'
  const percent = rules.gatePercents.gate3
  return stepWith({
    key: 'gate_3',
    title: 'Gate 3: sign, site control, milestone and deposit',
    short: 'Gate 3',
    stage,
    party: 'applicant',
    kind: 'gate',
    start: {
      mode: 'all',
      of: [{ step: fromDraft ? 'lgia_draft' : 'final_agreement', date: 'sent' }],
    },
    clocks: [
      fromDraft
        ? rules.calendarDays(60, { fromDayItself: true })
        : { length: 15, unit: 'business_day' },
    ],
    obligations: [
      { key: 'agreement', title: 'Agreement signed, or unsigned filing asked', what: 'document' },
      { key: 'land', title: 'Continued site control', what: 'site_control' },
      {
        key: 'milestone',
        title: 'One development milestone: fuel, water, equipment, sale or permit',
        what: 'document',
      },
      {
        key: 'deposit',
        title: `Agreement deposit to ${percent} % of assigned cost`,
        what: 'money',
        target: { kind: 'share', percent },
        account: readinessAccount,
        refundable: 'At commercial operation; 20 % is the penalty for a later withdrawal.',
        leadBusinessDays: rules.depositLeadDays,
      },
    ],
    outcomes: [
      { key: 'signed', title: 'Signed' },
      { key: 'unsigned_filing', title: 'Unsigned filing asked for' },
      { key: 'dispute', title: 'Dispute process started' },
    ],
    onMiss: rules.gateMissed,
    evidence: 'Signed agreement, milestone, receipt of the deposit',
    source: lgip.memory(
      'LG-34',
      '11.3',
      'medium',
      'The time to sign is LG-32, 11.2, counted from the tender and not its receipt. 20 % read in a law journal note; less what is held from memory.',
    ),
  })
}
