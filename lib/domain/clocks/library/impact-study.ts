import { noticeDuty, sources, stepWith, withdrawn } from '@/lib/domain/clocks/library/step-of'
import type { Expr, Step } from '@/lib/domain/clocks/procedure'

const sgip = sources('Pro forma SGIP')

interface ImpactSide {
  side: 'distribution' | 'transmission'
  /** Business days to tender the agreement after the feasibility report. */
  tenderDays: number
  tender: Step['source']
  studyDays: number
  study: Step['source']
}

const sides: ImpactSide[] = [
  {
    side: 'distribution',
    tenderDays: 15,
    tender: sgip.memory('SG-56', '3.4.2', 'medium'),
    studyDays: 30,
    study: sgip.adapted(
      'SG-59',
      'Att. 7',
      'Review by an affected system adds 20 business days: record it as an extension.',
    ),
  },
  {
    side: 'transmission',
    tenderDays: 5,
    tender: sgip.memory('SG-57', '3.4.3', 'medium'),
    studyDays: 45,
    study: sgip.adapted(
      'SG-60',
      'Att. 7',
      'Or as the queue procedure says. Review by an affected system adds 20 business days: record it as an extension.',
    ),
  },
]

/** Impact studies on distribution and transmission, each where needed: SG-56 to SG-60. */
export function impactSteps(returnDays: number): Step[] {
  return sides.flatMap((side) => sideSteps(side, returnDays))
}

function sideSteps({ side, tenderDays, tender, studyDays, study }: ImpactSide, returnDays: number) {
  const found = [side, 'impact_both']
  const skipped: Expr = { outcome: 'study_tender', in: found }
  const needed: Expr = { any: [skipped, { outcome: 'feasibility_study', in: found }] }
  const expected = side === 'distribution'
  return [
    stepWith({
      key: `${side}_tender`,
      title: `Tender the ${side} impact study agreement`,
      short: 'Agreement tendered',
      stage: 'Impact study',
      party: 'operator',
      needs: { outcome: 'feasibility_study', in: found },
      start: { mode: 'all', of: [{ step: 'feasibility_study', outcome: found }] },
      clocks: [{ length: tenderDays, unit: 'business_day' }],
      outcomes: [{ key: 'tendered', title: 'Tendered' }],
      source: tender,
    }),
    stepWith({
      key: `${side}_agreement`,
      title: `Return the ${side} impact study agreement`,
      short: 'Agreement returned',
      stage: 'Impact study',
      party: 'applicant',
      needs: needed,
      expected,
      start: {
        mode: 'any',
        of: [{ step: 'study_tender', outcome: found }, { step: `${side}_tender` }],
      },
      clocks: [{ length: returnDays, unit: 'business_day' }],
      obligations: [
        { key: 'agreement', title: 'Signed agreement', what: 'document' },
        { key: 'deposit', title: depositTitle(side), what: 'money', leadBusinessDays: 3 },
      ],
      outcomes: [{ key: 'returned', title: 'Returned with the deposit' }],
      onMiss: withdrawn('Call, then return the agreement or ask for more time.'),
      source: sgip.memory('SG-58', '3.4.6, 3.4.7, Att. 7', 'medium'),
    }),
    stepWith({
      key: `${side}_study`,
      title: `${side === 'distribution' ? 'Distribution' : 'Transmission'} impact study`,
      short: 'Impact study',
      stage: 'Impact study',
      party: 'operator',
      needs: needed,
      expected,
      start: { mode: 'all', of: [{ step: `${side}_agreement` }] },
      clocks: [{ length: studyDays, unit: 'business_day' }],
      outcomes: [
        { key: 'upgrades', title: 'Upgrades needed' },
        { key: 'no_upgrades', title: 'No upgrades needed' },
      ],
      onMiss: noticeDuty,
      evidence: 'Study report',
      source: study,
    }),
  ]
}

function depositTitle(side: ImpactSide['side']): string {
  return side === 'distribution' ? 'Deposit of the estimate' : 'Deposit of half the estimate'
}
