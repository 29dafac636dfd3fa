import { agreementToOperation } from '@/lib/domain/clocks/library/agreement'
import { objections } from '@/lib/domain/clocks/library/at-any-time'
import { smallGeneratorEntry } from '@/lib/domain/clocks/library/entry'
import {
  afterFastTrack,
  fastTrackLoops,
  fastTrackStages,
  screensToAgreement,
} from '@/lib/domain/clocks/library/fast-track'
import type { ProcedureBody, Step } from '@/lib/domain/clocks/procedure'

/**
 * A state's level 2 review by screens, in the shape of the federal fast track with clocks of its
 * own: the determination again 5 business days after a cure, withdrawal on notice with one
 * extension of at most 10 business days, 10 business days of test notice, a fee of $1,500. The
 * state is made up; time in which the utility waits for the applicant is recorded as stops.
 */
export function stateLevelTwo(options: { supplementalDepositMinor?: number } = {}): ProcedureBody {
  const steps = [
    ...smallGeneratorEntry(
      { title: 'Level 2 fee, not refundable', amountMinor: 150_000 },
      {
        recheck: { when: { instanceAbove: 1 }, length: 5, unit: 'business_day' },
        cureMissed: {
          effect: 'withdrawn_on_notice',
          say: 'Withdrawn on their notice; they may extend once by at most 10 business days.',
          first: 'Write today and ask for the extension.',
        },
      },
    ),
    ...screensToAgreement(options),
    ...agreementToOperation({ ...afterFastTrack, testNoticeDays: 10 }),
    ...objections(),
  ]
  return {
    key: 'state_level_two',
    title: 'State procedure, level 2',
    stages: fastTrackStages,
    filedStep: 'file',
    operationStep: 'operation',
    loops: fastTrackLoops,
    steps: steps.map(sourcedFromState),
  }
}

const ownClocks: Record<string, string> = {
  file: 'Fee of $1,500.',
  completeness: 'After a cure 5 business days; nothing is deemed complete.',
  cure: 'Withdrawn on notice; one extension of at most 10 business days.',
  test_notice: 'At least 10 business days before the test.',
}

function sourcedFromState(step: Step): Step {
  const note = ownClocks[step.key] ?? `As in the ${step.source.document}, ${step.source.section}.`
  return {
    ...step,
    source: {
      document: 'State procedure, level 2 (made up)',
      section: step.stage,
      basis: 'from_memory',
      confidence: 'low',
      note,
      ...(step.source.id && { id: step.source.id }),
    },
  }
}
