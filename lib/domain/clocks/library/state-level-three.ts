import { noticeDuty, sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type { Expr, Step, StepRef } from '@/lib/domain/clocks/procedure'

const state = sources('State procedures, generic')

interface LevelThree {
  needs: Expr
  /** What brings a request here: its level, or a review that it did not pass. */
  from: StepRef[]
  /** Business days to return a study agreement: 15, or 30 in the federal text. */
  returnDays: number
}

/** Level 3 of a state procedure: scoping, impact study, facilities study. */
export function levelThree({ needs, from, returnDays }: LevelThree): Step[] {
  const shared = { stage: 'Study', needs }
  return [
    stepWith({
      ...shared,
      key: 'scoping',
      title: 'Scoping meeting',
      short: 'Scoping',
      party: 'both',
      start: { mode: 'any', of: from },
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [{ key: 'held', title: 'Held' }],
      onMiss: {
        effect: 'duty',
        say: 'Another day must be agreed, or the meeting waived.',
        first: 'Agree on a day in writing, or waive the meeting.',
      },
      source: state.adapted('ST-10', 'Level 3'),
    }),
    ...studyPair({ needs, returnDays, key: 'impact', name: 'impact study', from: 'scoping' }),
    ...studyPair({
      needs,
      returnDays,
      key: 'facilities',
      name: 'facilities study',
      from: 'impact_report',
    }),
  ]
}

interface StudyPair extends Omit<LevelThree, 'from'> {
  key: 'impact' | 'facilities'
  name: string
  from: string
}

/** Agreement tendered, returned with its deposit, and the report. */
function studyPair({ key, name, from, needs, returnDays }: StudyPair): Step[] {
  const shared = { stage: 'Study', needs }
  return [
    stepWith({
      ...shared,
      key: `${key}_tender`,
      title: `Tender the ${name} agreement`,
      short: 'Agreement tendered',
      party: 'operator',
      start: { mode: 'all', of: [{ step: from }] },
      clocks: [{ length: 5, unit: 'business_day' }],
      outcomes: [{ key: 'sent', title: 'Agreement sent' }],
      source: state.adapted('ST-11', 'Level 3'),
    }),
    stepWith({
      ...shared,
      key: `${key}_agreement`,
      title: `Return the ${name} agreement`,
      short: 'Agreement returned',
      party: 'applicant',
      start: { mode: 'all', of: [{ step: `${key}_tender` }] },
      clocks: [{ length: returnDays, unit: 'business_day' }],
      obligations: [
        { key: 'agreement', title: 'Signed agreement', what: 'document' },
        { key: 'deposit', title: 'Study deposit', what: 'money', leadBusinessDays: 3 },
      ],
      outcomes: [{ key: 'returned', title: 'Returned with the deposit' }],
      onMiss: withdrawn('Return it, or ask for more time in writing, before the hour closes.'),
      source: state.read('ST-12', 'Level 3', '15 business days in the Carolinas pattern.'),
    }),
    stepWith({
      ...shared,
      key: `${key}_report`,
      title: `Report of the ${name}`,
      short: 'Report',
      party: 'operator',
      start: { mode: 'all', of: [{ step: `${key}_agreement` }] },
      clocks: [{ length: 45, unit: 'business_day' }],
      outcomes: [{ key: 'given', title: 'Report given' }],
      onMiss: noticeDuty,
      typical: { shortest: 60, likely: 75, longest: 130 },
      source: state.memory('ST-13', 'Level 3', 'medium', 'The length may be as agreed at scoping.'),
    }),
  ]
}
