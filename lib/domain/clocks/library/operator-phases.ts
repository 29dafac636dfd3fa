import {
  readinessAccount,
  readinessAtRequest,
  studyDeposit,
} from '@/lib/domain/clocks/library/cluster-money'
import { noticeDuty, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type {
  ClockRule,
  MoneyRule,
  ObligationRule,
  ProcedureBody,
  Roll,
  RuleSource,
  Step,
} from '@/lib/domain/clocks/procedure'

const source: RuleSource = {
  document: 'Regional operators, generic',
  section: 'none',
  basis: 'from_memory',
  confidence: 'low',
  note: 'A common shape, no operator’s own numbers: fit each clock to the filed tariff.',
}

/** One phase: how long its study takes, how long the decision has, and what is then held. */
export interface PhaseOptions {
  studyDays: number
  decisionDays: number
  /** Percent of assigned cost to reach at its decision point. */
  percent: number
}

export interface OperatorPhasesOptions {
  key?: string
  title?: string
  windowDays?: number
  calendarRoll?: Roll
  studyDeposit?: MoneyRule
  readiness?: MoneyRule
  phases?: PhaseOptions[]
  /** Calendar days to sign the agreement. */
  signDays?: number
}

const usualPhases: PhaseOptions[] = [
  { studyDays: 120, decisionDays: 30, percent: 10 },
  { studyDays: 180, decisionDays: 30, percent: 20 },
  { studyDays: 180, decisionDays: 30, percent: 30 },
]

/**
 * A generic operator process in phases: a window, then studies of the whole cycle, each ending
 * at a decision point where deposits rise or the request leaves.
 */
export function operatorPhases(options: OperatorPhasesOptions = {}): ProcedureBody {
  const roll = options.calendarRoll ? { roll: options.calendarRoll } : {}
  const days = (length: number, more: Partial<ClockRule> = {}): ClockRule => ({
    length,
    unit: 'calendar_day',
    ...roll,
    ...more,
  })
  const phases = options.phases ?? usualPhases
  return {
    key: options.key ?? 'operator_phases',
    title: options.title ?? 'Regional operator, in phases',
    stages: [
      'Request',
      ...phases.map((_, at) => `Phase ${at + 1}`),
      'Agreement',
      'Construction',
      'Operation',
    ],
    filedStep: 'file',
    operationStep: 'operation',
    loops: [
      {
        key: 'deficiency',
        scope: ['validity', 'cure'],
        again: { step: 'cure', outcome: 'supplied' },
      },
    ],
    steps: [
      ...requestSteps(options, days),
      ...phases.flatMap((phase, at) => phaseSteps(phase, at + 1, days)),
      ...agreementSteps(phases.length, days(options.signDays ?? 60, { fromDayItself: true })),
      ...toOperation,
    ],
  }
}

type Days = (length: number, more?: Partial<ClockRule>) => ClockRule

function requestSteps(options: OperatorPhasesOptions, days: Days): Step[] {
  const shared = { stage: 'Request', source }
  const money: ObligationRule[] = [
    {
      key: 'study_deposit',
      title: 'Study deposit',
      what: 'money',
      target: options.studyDeposit ?? studyDeposit,
      leadBusinessDays: 5,
    },
    {
      key: 'readiness',
      title: 'Readiness deposit',
      what: 'money',
      target: options.readiness ?? readinessAtRequest,
      account: readinessAccount,
      leadBusinessDays: 5,
    },
  ]
  return [
    stepWith({
      ...shared,
      key: 'window_open',
      title: 'Cycle opens',
      party: 'operator',
      kind: 'window',
      clocks: [
        {
          from: { step: 'window_open', date: 'scheduled' },
          length: 0,
          unit: 'calendar_day',
          fromDayItself: true,
        },
      ],
      outcomes: [{ key: 'opened', title: 'Opened' }],
      overtakenBy: ['window_close', 'phase_1_report'],
    }),
    stepWith({
      ...shared,
      key: 'window_close',
      title: 'Cycle closes',
      party: 'operator',
      kind: 'window',
      start: { mode: 'all', of: [{ step: 'window_open' }] },
      clocks: [days(options.windowDays ?? 60, { fromDayItself: true })],
      outcomes: [{ key: 'closed', title: 'Closed' }],
      onMiss: {
        effect: 'presumed',
        outcome: 'closed',
        say: 'The cycle closes by itself.',
        first: 'Confirm the day on which it closed.',
      },
      overtakenBy: ['phase_1_report'],
    }),
    stepWith({
      ...shared,
      key: 'file',
      title: 'File the request',
      short: 'Filed',
      party: 'applicant',
      clocks: [
        {
          from: { step: 'window_close', date: 'due' },
          length: 0,
          unit: 'calendar_day',
          fromDayItself: true,
        },
      ],
      obligations: [
        { key: 'form', title: 'Application', what: 'document' },
        { key: 'models', title: 'Technical data and models', what: 'data', owner: 'engineer' },
        { key: 'land', title: 'Site control', what: 'site_control' },
        ...money,
      ],
      outcomes: [{ key: 'filed', title: 'Filed' }],
      onMiss: {
        effect: 'track',
        say: 'The request waits for the next cycle.',
        first: 'File what is ready before the hour closes.',
      },
    }),
    stepWith({
      ...shared,
      key: 'validity',
      title: 'Notice that the request is valid or deficient',
      short: 'Validity',
      party: 'operator',
      start: { mode: 'any', of: [{ step: 'file' }, { step: 'cure', instance: 'previous' }] },
      clocks: [{ length: 15, unit: 'business_day' }],
      outcomes: [
        { key: 'valid', title: 'Valid' },
        { key: 'deficient', title: 'Deficient' },
      ],
      onMiss: noticeDuty,
    }),
    stepWith({
      ...shared,
      key: 'cure',
      title: 'Cure the deficiency',
      short: 'Cure',
      party: 'applicant',
      owner: 'engineer',
      needs: { outcome: 'validity', in: ['deficient'] },
      start: { mode: 'all', of: [{ step: 'validity', outcome: ['deficient'] }] },
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [{ key: 'supplied', title: 'Supplied' }],
      onMiss: withdrawn('Send what is ready before the hour closes.'),
    }),
  ]
}

function phaseSteps(phase: PhaseOptions, no: number, days: Days): Step[] {
  const stage = `Phase ${no}`
  const from = no === 1 ? 'window_close' : `decision_${no - 1}`
  const later: ObligationRule[] =
    no === 1 ? [] : [{ key: 'data', title: 'Technical data', what: 'data', owner: 'engineer' }]
  return [
    stepWith({
      key: `phase_${no}_report`,
      title: `Phase ${no} study report`,
      short: `Phase ${no} report`,
      stage,
      party: 'operator',
      start: { mode: 'all', of: [{ step: from }] },
      clocks: [days(phase.studyDays, { fromDayItself: true })],
      outcomes: [{ key: 'issued', title: 'Issued' }],
      onMiss: noticeDuty,
      evidence: 'Report with the cost assigned to the request',
      typical: {
        shortest: phase.studyDays,
        likely: Math.round(phase.studyDays * 1.25),
        longest: phase.studyDays * 2,
      },
      source,
    }),
    stepWith({
      key: `decision_${no}`,
      title: `Decision point ${no}`,
      stage,
      party: 'applicant',
      kind: 'gate',
      start: { mode: 'all', of: [{ step: `phase_${no}_report` }] },
      clocks: [days(phase.decisionDays)],
      obligations: [
        { key: 'land', title: 'Continued site control', what: 'site_control' },
        ...later,
        {
          key: 'deposit',
          title: `Readiness deposit to ${phase.percent} % of assigned cost`,
          what: 'money',
          target: { kind: 'share', percent: phase.percent },
          account: readinessAccount,
          leadBusinessDays: 5,
        },
      ],
      outcomes: [
        { key: 'proceed', title: 'Proceed' },
        { key: 'reduced', title: 'Proceed with fewer MW' },
      ],
      onMiss: withdrawn('Call the customer desk, then post what is open today.'),
      source,
    }),
  ]
}

function agreementSteps(phases: number, sign: ClockRule): Step[] {
  const shared = { stage: 'Agreement', source }
  return [
    stepWith({
      ...shared,
      key: 'agreement_tender',
      title: 'Tender the interconnection agreement',
      short: 'Agreement tendered',
      party: 'operator',
      start: { mode: 'all', of: [{ step: `decision_${phases}` }] },
      clocks: [{ length: 30, unit: 'calendar_day', ...(sign.roll && { roll: sign.roll }) }],
      outcomes: [{ key: 'sent', title: 'Agreement sent' }],
    }),
    stepWith({
      ...shared,
      key: 'sign',
      title: 'Sign the agreement and post security',
      short: 'Agreement signed',
      party: 'applicant',
      kind: 'gate',
      start: { mode: 'all', of: [{ step: 'agreement_tender', date: 'sent' }] },
      clocks: [sign],
      obligations: [
        { key: 'agreement', title: 'Agreement, signed by three parties', what: 'document' },
        { key: 'security', title: 'Security', what: 'money', leadBusinessDays: 20 },
      ],
      outcomes: [
        { key: 'signed', title: 'Signed' },
        { key: 'unsigned_filing', title: 'Unsigned filing asked for' },
      ],
      onMiss: withdrawn('Sign, or ask for the unsigned filing, before the hour closes.'),
    }),
  ]
}

const toOperation: Step[] = [
  stepWith({
    key: 'built',
    title: 'Build the facility and the network upgrades',
    short: 'Built',
    stage: 'Construction',
    party: 'both',
    owner: 'engineer',
    start: { mode: 'all', of: [{ step: 'sign' }] },
    outcomes: [{ key: 'complete', title: 'Complete' }],
    typical: { shortest: 500, likely: 720, longest: 1100 },
    source,
  }),
  stepWith({
    key: 'operation',
    title: 'Commercial operation',
    short: 'COD',
    stage: 'Operation',
    party: 'applicant',
    start: { mode: 'all', of: [{ step: 'built' }] },
    clocks: [
      {
        from: { step: 'operation', date: 'scheduled' },
        length: 0,
        unit: 'calendar_day',
        fromDayItself: true,
      },
    ],
    outcomes: [{ key: 'operating', title: 'In operation' }],
    typical: { shortest: 60, likely: 90, longest: 150 },
    source,
  }),
]
