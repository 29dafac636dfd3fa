import { stepWith } from '@/lib/domain/clocks/library/step-of'
import type { ProcedureBody, RuleSource } from '@/lib/domain/clocks/procedure'

const source: RuleSource = {
  document: 'Outline without rules',
  section: 'none',
  basis: 'from_memory',
  confidence: 'low',
  note: 'No clock is counted: dates are those the utility states.',
}

/**
 * A request followed by the dates its utility states, until the utility's own procedure is kept.
 * No rule is behind it, so no step counts a clock.
 */
export function outlineProcedure(): ProcedureBody {
  return {
    key: 'outline',
    title: 'Outline, by stated dates',
    stages: [
      'Request',
      'Studies',
      'Decision',
      'Facilities study',
      'Agreement',
      'Construction',
      'Operation',
    ],
    filedStep: 'file',
    operationStep: 'operation',
    loops: [],
    steps: [
      stepWith({
        key: 'file',
        title: 'File the request',
        short: 'Filed',
        stage: 'Request',
        party: 'applicant',
        outcomes: [{ key: 'filed', title: 'Filed' }],
        source,
      }),
      stepWith({
        key: 'study',
        title: 'Study report',
        stage: 'Studies',
        party: 'operator',
        start: { mode: 'all', of: [{ step: 'file' }] },
        outcomes: [{ key: 'given', title: 'Report given' }],
        source,
      }),
      stepWith({
        key: 'meeting',
        title: 'Report meeting',
        stage: 'Studies',
        party: 'both',
        owner: 'liaison',
        start: { mode: 'all', of: [{ step: 'study' }] },
        outcomes: [{ key: 'held', title: 'Held' }],
        source,
      }),
      stepWith({
        key: 'gate',
        title: 'Gate: agreement, data, land, deposit',
        short: 'Gate',
        stage: 'Decision',
        party: 'applicant',
        kind: 'gate',
        start: { mode: 'all', of: [{ step: 'meeting' }] },
        obligations: [
          { key: 'agreement', title: 'Study agreement, signed', what: 'document' },
          { key: 'data', title: 'Technical data', what: 'data', owner: 'engineer' },
          { key: 'land', title: 'Site control', what: 'site_control' },
          { key: 'deposit', title: 'Readiness deposit', what: 'money', leadBusinessDays: 5 },
        ],
        outcomes: [{ key: 'met', title: 'Met' }],
        onMiss: {
          effect: 'withdrawn',
          say: 'The request is withdrawn.',
          first: 'Call the queue desk, then post what is open.',
        },
        source,
      }),
      stepWith({
        key: 'facilities',
        title: 'Facilities study',
        stage: 'Facilities study',
        party: 'operator',
        start: { mode: 'all', of: [{ step: 'gate' }] },
        outcomes: [{ key: 'given', title: 'Report given' }],
        source,
      }),
      stepWith({
        key: 'sign',
        title: 'Sign the interconnection agreement',
        short: 'Agreement signed',
        stage: 'Agreement',
        party: 'applicant',
        start: { mode: 'all', of: [{ step: 'facilities' }] },
        outcomes: [{ key: 'signed', title: 'Signed' }],
        source,
      }),
      stepWith({
        key: 'security',
        title: 'Post security',
        stage: 'Construction',
        party: 'applicant',
        start: { mode: 'all', of: [{ step: 'sign' }] },
        outcomes: [{ key: 'posted', title: 'Posted' }],
        source,
      }),
      stepWith({
        key: 'backfeed',
        title: 'Back-feed',
        stage: 'Construction',
        party: 'operator',
        start: { mode: 'all', of: [{ step: 'security' }] },
        outcomes: [{ key: 'given', title: 'Given' }],
        source,
      }),
      stepWith({
        key: 'operation',
        title: 'Commercial operation',
        short: 'COD',
        stage: 'Operation',
        party: 'applicant',
        start: { mode: 'all', of: [{ step: 'backfeed' }] },
        outcomes: [{ key: 'operating', title: 'In operation' }],
        source,
      }),
    ],
  }
}
