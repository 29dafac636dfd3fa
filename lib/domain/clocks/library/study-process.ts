import { agreementToOperation, retestLoop } from '@/lib/domain/clocks/library/agreement'
import { accountSteps, objections } from '@/lib/domain/clocks/library/at-any-time'
import { deficiencyLoop, smallGeneratorEntry } from '@/lib/domain/clocks/library/entry'
import { facilitiesSteps } from '@/lib/domain/clocks/library/facilities-study'
import { impactSteps } from '@/lib/domain/clocks/library/impact-study'
import { noticeDuty, sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type { ProcedureBody, Roll, Step } from '@/lib/domain/clocks/procedure'

const sgip = sources('Pro forma SGIP')

export interface StudyProcessOptions {
  key?: string
  title?: string
  /** Deposit with the request; $1,000 toward the feasibility study in the pro forma. */
  entryDeposit?: { title: string; amountMinor: number }
  /** Business days to return the impact study agreements; 30 in the pro forma. */
  impactReturnDays?: number
  /** Business days to return the facilities study agreement; 30 in the pro forma. */
  facilitiesReturnDays?: number
  facilitiesDepositMinor?: number
  testNoticeDays?: number
  /** Whether a deadline in calendar days rolls off a closed day; never in the pro forma. */
  calendarRoll?: Roll
}

/** The federal small-generator study process: SG-50 to SG-68, then agreement and testing. */
export function federalStudyProcess(options: StudyProcessOptions = {}): ProcedureBody {
  const roll = options.calendarRoll ? { roll: options.calendarRoll } : {}
  return {
    key: options.key ?? 'federal_study_process',
    title: options.title ?? 'Small generator, study process',
    stages: [
      'Request',
      'Scoping',
      'Feasibility study',
      'Impact study',
      'Facilities study',
      'Agreement',
      'Construction',
      'Testing',
      'Operation',
    ],
    filedStep: 'file',
    operationStep: 'operation',
    loops: [deficiencyLoop, retestLoop],
    steps: [
      ...smallGeneratorEntry(
        options.entryDeposit ?? {
          title: 'Deposit toward the feasibility study',
          amountMinor: 100_000,
        },
      ),
      ...scopingSteps,
      ...feasibilitySteps,
      ...impactSteps(options.impactReturnDays ?? 30),
      ...facilitiesSteps({
        returnDays: options.facilitiesReturnDays ?? 30,
        depositMinor: options.facilitiesDepositMinor,
        roll,
      }),
      ...accountSteps({
        key: 'study',
        title: 'studies',
        stage: 'Facilities study',
        clock: { length: 30, unit: 'calendar_day', ...roll },
        source: sgip.memory('SG-68', 'Att. 6 to 8'),
      }),
      ...agreementToOperation({
        tendered: [{ step: 'agreement_feasibility' }, { step: 'agreement_study' }],
        construction: { done: 'agree_to_pay' },
        testNoticeDays: options.testNoticeDays,
        calendarRoll: options.calendarRoll,
      }),
      ...objections(),
    ],
  }
}

const scopingSteps: Step[] = [
  stepWith({
    key: 'scoping',
    title: 'Scoping meeting',
    short: 'Scoping',
    stage: 'Scoping',
    party: 'both',
    owner: 'developer',
    start: { mode: 'all', of: [{ step: 'completeness', outcome: ['complete'], date: 'sent' }] },
    clocks: [{ length: 10, unit: 'business_day' }],
    outcomes: [{ key: 'held', title: 'Held' }],
    onMiss: {
      effect: 'duty',
      say: 'Another day must be agreed, or the meeting waived.',
      first: 'Agree on a day in writing, or waive the meeting.',
    },
    source: sgip.adapted('SG-50', '3.2.1', 'May be waived; another date by agreement.'),
  }),
  stepWith({
    key: 'study_tender',
    title: 'Tender the first study agreement',
    short: 'Agreement tendered',
    stage: 'Scoping',
    party: 'operator',
    start: { mode: 'all', of: [{ step: 'scoping' }] },
    clocks: [{ length: 5, unit: 'business_day' }],
    outcomes: [
      { key: 'feasibility', title: 'Feasibility study' },
      { key: 'distribution', title: 'Feasibility skipped: distribution impact study' },
      { key: 'transmission', title: 'Feasibility skipped: transmission impact study' },
      { key: 'impact_both', title: 'Feasibility skipped: both impact studies' },
    ],
    evidence: 'Agreement with scope and estimate',
    source: sgip.adapted('SG-51', '3.2.2, 3.2.3'),
  }),
]

const feasibilitySteps: Step[] = [
  stepWith({
    key: 'feasibility_agreement',
    title: 'Return the feasibility study agreement',
    short: 'Agreement returned',
    stage: 'Feasibility study',
    party: 'applicant',
    needs: { outcome: 'study_tender', in: ['feasibility'] },
    expected: true,
    start: { mode: 'all', of: [{ step: 'study_tender', outcome: ['feasibility'] }] },
    clocks: [{ length: 15, unit: 'business_day' }],
    obligations: [
      { key: 'agreement', title: 'Signed agreement', what: 'document' },
      {
        key: 'deposit',
        title: 'Deposit: the lesser of half the estimate and $1,000',
        what: 'money',
        leadBusinessDays: 3,
      },
    ],
    outcomes: [{ key: 'returned', title: 'Returned with the deposit' }],
    onMiss: withdrawn('Call, then return the agreement or ask for more time.'),
    source: sgip.adapted('SG-52', '3.2.3', 'Deposit: SG-53, 3.3.2.'),
  }),
  stepWith({
    key: 'feasibility_study',
    title: 'Feasibility study',
    short: 'Feasibility',
    stage: 'Feasibility study',
    party: 'operator',
    needs: { outcome: 'study_tender', in: ['feasibility'] },
    expected: true,
    start: { mode: 'all', of: [{ step: 'feasibility_agreement' }] },
    clocks: [{ length: 30, unit: 'business_day' }],
    outcomes: [
      { key: 'distribution', title: 'Impacts on distribution' },
      { key: 'transmission', title: 'Impacts on transmission' },
      { key: 'impact_both', title: 'Impacts on both' },
      { key: 'none', title: 'No impacts and nothing to build' },
    ],
    onMiss: noticeDuty,
    evidence: 'Study report',
    source: sgip.adapted('SG-54', 'Att. 6'),
  }),
  stepWith({
    key: 'agreement_feasibility',
    title: 'Send the agreement after the feasibility study',
    short: 'Agreement sent',
    stage: 'Agreement',
    party: 'operator',
    needs: { outcome: 'feasibility_study', in: ['none'] },
    start: { mode: 'all', of: [{ step: 'feasibility_study', outcome: ['none'] }] },
    clocks: [{ length: 5, unit: 'business_day' }],
    outcomes: [{ key: 'sent', title: 'Executable agreement sent' }],
    source: sgip.read('SG-55', '3.3.4'),
  }),
]
