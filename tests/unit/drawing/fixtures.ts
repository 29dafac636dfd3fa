import type { LossPlace } from '@/components/chart/losses'
import type { OneLineElement } from '@/components/drawing/one-line-model'
import type { LineModel, LineStep } from '@/components/line/model'

/** A sequence with every state, a gate with obligations, a tap and a step without a date. */
export function sampleModel(): LineModel {
  const base = { instance: 1, kind: 'step' as const }
  const steps: LineStep[] = [
    { ...base, key: 'filed', title: 'Filed', party: 'ours', state: 'done', on: '2026-02-10' },
    { ...base, key: 'waived', title: 'Scoping', party: 'both', state: 'waived', on: '2026-03-01' },
    { ...base, key: 'skip', title: 'Feasibility', party: 'theirs', state: 'not_needed' },
    { ...base, key: 'late', title: 'Cure', party: 'ours', state: 'missed', on: '2026-11-30' },
    {
      ...base,
      key: 'gate',
      title: 'Gate 2',
      party: 'ours',
      kind: 'gate',
      state: 'running',
      on: '2026-12-10',
      onLabel: '10 Dec',
      obligations: [
        { title: 'Deposit', done: true },
        { title: 'Site control', done: false },
      ],
    },
    { ...base, key: 'open', title: 'Notice', party: 'ours', state: 'open', on: '2026-12-20' },
    { ...base, key: 'tap', title: 'Affected system', party: 'theirs', state: 'ahead', tap: true },
  ]
  return {
    steps,
    todayOn: '2026-12-01',
    running: { fromOn: '2026-11-10', toOn: '2026-12-10', label: '30 days, 9 left', tone: 'soon' },
  }
}

export function sampleElements(): OneLineElement[] {
  return [
    { kind: 'pv_array', title: 'PV array', subtitle: '62.40 MWdc' },
    { kind: 'inverter', title: 'Inverters', subtitle: '14 × 4.20 MVA' },
    { kind: 'storage', title: 'Storage', subtitle: '20 MW, 80 MWh' },
    {
      kind: 'transformer',
      title: 'Pad-mount transformers',
      subtitle: '14 × 4.4 MVA, 5.75 %',
      winding: ['Δ', 'Y'],
    },
    {
      kind: 'breaker',
      title: 'Breaker',
      subtitle: '34.5 kV, 1,200 A',
      relay: ['27', '59', '81O', '81U', '51N'],
    },
    { kind: 'meter', title: 'Revenue meter', subtitle: '69 kV' },
    { kind: 'disconnect', title: 'Disconnect', subtitle: 'visible, lockable' },
    { kind: 'poi', title: 'POI', subtitle: '48.0 MWac' },
    { kind: 'utility', title: 'Utility', subtitle: '69 kV bus' },
  ]
}

export function samplePlaces(): LossPlace[] {
  return [
    {
      kind: 'pv_array',
      title: 'Array',
      energyKwh: 131_200_000,
      losses: [
        { label: 'Soiling', fraction: 0.02 },
        { label: 'DC wiring', fraction: 0.015 },
      ],
    },
    {
      kind: 'inverter',
      title: 'Inverters',
      energyKwh: 124_100_000,
      losses: [{ label: 'Clipped by the export limit', fraction: 0.007, clips: true }],
    },
    { kind: 'poi', title: 'POI', energyKwh: 112_400_000, losses: [] },
  ]
}
