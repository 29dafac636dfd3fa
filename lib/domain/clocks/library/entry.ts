import type { ClockRule, Consequence, Loop, Step } from '@/lib/domain/clocks/procedure'
import { noticeDuty, sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'

const sgip = sources('Pro forma SGIP')

export const deficiencyLoop: Loop = {
  key: 'deficiency',
  scope: ['completeness', 'cure'],
  again: { step: 'cure', outcome: 'supplied' },
}

interface EntryFee {
  title: string
  amountMinor: number
}

interface EntryOptions {
  /** The clock of the determination after a cure; left out: deemed complete on submission. */
  recheck?: ClockRule
  /** What follows a cure that comes too late; left out: withdrawn. */
  cureMissed?: Consequence
}

const deemedComplete: ClockRule = {
  when: { instanceAbove: 1 },
  length: 0,
  unit: 'calendar_day',
  onMiss: {
    effect: 'presumed',
    outcome: 'complete',
    say: 'Deemed complete once the listed items are supplied.',
    first: 'Ask for the notice that the request is complete.',
  },
}

/** Entry and completeness of the small-generator procedures: SG-04 to SG-11. */
export function smallGeneratorEntry(fee: EntryFee, options: EntryOptions = {}): Step[] {
  return [
    fileStep(fee),
    stepWith({
      key: 'acknowledge',
      title: 'Acknowledge receipt',
      short: 'Receipt',
      stage: 'Request',
      party: 'operator',
      start: { mode: 'all', of: [{ step: 'file' }] },
      clocks: [{ length: 3, unit: 'business_day' }],
      outcomes: [{ key: 'acknowledged', title: 'Acknowledged, with date and time stamp' }],
      overtakenBy: ['completeness'],
      source: sgip.adapted(
        'SG-06',
        '1.3',
        'SG-05: the original stamp governs every timetable. SG-11, 1.6: it also fixes the queue position. SG-13, 4.7: records are kept 3 years.',
      ),
    }),
    completenessStep(options.recheck ?? deemedComplete),
    cureStep(options.cureMissed),
  ]
}

function fileStep(fee: EntryFee): Step {
  return stepWith({
    key: 'file',
    title: 'File the request',
    short: 'Filed',
    stage: 'Request',
    party: 'applicant',
    obligations: [
      {
        key: 'form',
        title: 'Application form with technical data',
        what: 'document',
        owner: 'engineer',
      },
      { key: 'land', title: 'Evidence of site control', what: 'site_control' },
      {
        key: 'fee',
        title: fee.title,
        what: 'money',
        target: { kind: 'fixed', amountMinor: fee.amountMinor },
        leadBusinessDays: 3,
      },
    ],
    outcomes: [{ key: 'filed', title: 'Filed' }],
    evidence: 'Portal receipt or date stamp',
    source: sgip.memory('SG-04', '1.3, 1.5, Att. 2'),
  })
}

function completenessStep(recheck: ClockRule): Step {
  return stepWith({
    key: 'completeness',
    title: 'Completeness determination',
    short: 'Completeness',
    stage: 'Request',
    party: 'operator',
    start: { mode: 'any', of: [{ step: 'file' }, { step: 'cure', instance: 'previous' }] },
    clocks: [recheck, { length: 10, unit: 'business_day' }],
    outcomes: [
      { key: 'complete', title: 'Complete' },
      { key: 'deficient', title: 'Deficient, with a list of what is missing' },
    ],
    onMiss: noticeDuty,
    evidence: 'Notice of completeness or deficiency',
    source: sgip.adapted('SG-07', '1.3', 'After a cure: deemed complete on submission (SG-09).'),
  })
}

function cureStep(onMiss?: Consequence): Step {
  return stepWith({
    key: 'cure',
    title: 'Cure the deficiency',
    short: 'Cure',
    stage: 'Request',
    party: 'applicant',
    owner: 'engineer',
    needs: { outcome: 'completeness', in: ['deficient'] },
    start: { mode: 'all', of: [{ step: 'completeness', outcome: ['deficient'] }] },
    clocks: [{ length: 10, unit: 'business_day' }],
    outcomes: [{ key: 'supplied', title: 'Listed items supplied' }],
    onMiss: onMiss ?? withdrawn('Call, then ask for more time in writing.'),
    evidence: 'Receipt of what was supplied',
    source: sgip.adapted('SG-08', '1.3', 'More time on request; the length is not fixed.'),
  })
}
