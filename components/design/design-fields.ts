import type { DesignBody } from '@/lib/schemas/design'

/** One typed quantity or name of a design. */
export interface DesignFieldSpec {
  /** Where it stands in the design: `module.vocV`. */
  path: string
  label: string
  unit?: string
  /** Shown as this many times the stored value: 100 for fractions typed in percent. */
  times?: number
  /** Fewest decimals shown. */
  digits?: number
  /** Words instead of a quantity. */
  isText?: boolean
}

const percent = { unit: '%', times: 100, digits: 1 }

export const plantFields = {
  strings: [
    { path: 'modulesPerString', label: 'Modules in series' },
    { path: 'strings', label: 'Strings' },
  ],
  inverters: [
    { path: 'inverter.count', label: 'Inverters' },
    { path: 'inverter.ratedKva', label: 'Rating of each', unit: 'kVA' },
  ],
  poi: [
    { path: 'exportLimitMw', label: 'Export limit at the POI', unit: 'MWac', digits: 2 },
    { path: 'powerFactorAtPoi', label: 'Power factor at the POI', digits: 2 },
  ],
  tracker: [
    { path: 'mounting.axisAzimuthDeg', label: 'Tracker, axis azimuth', unit: '°' },
    { path: 'mounting.groundCoverRatio', label: 'Ground cover ratio', digits: 2 },
    { path: 'mounting.maxRotationDeg', label: 'Rotation, at most ±', unit: '°' },
  ],
  fixed: [
    { path: 'mounting.tiltDeg', label: 'Tilt', unit: '°' },
    { path: 'mounting.azimuthDeg', label: 'Azimuth', unit: '°' },
  ],
  losses: [
    { path: 'module.gammaPmaxPctPerC', label: 'Power coefficient', unit: '%/°C', digits: 2 },
    { path: 'inverter.efficiency', label: 'Inverter efficiency', ...percent },
    { path: 'acLossFraction', label: 'Transformers and line', ...percent },
  ],
} satisfies Record<string, DesignFieldSpec[]>

export const moduleFields: DesignFieldSpec[] = [
  { path: 'module.name', label: 'Module', isText: true },
  { path: 'module.pmaxW', label: 'Pmax', unit: 'W' },
  { path: 'module.vocV', label: 'Voc', unit: 'V', digits: 1 },
  { path: 'module.vmpV', label: 'Vmp', unit: 'V', digits: 1 },
  { path: 'module.iscA', label: 'Isc', unit: 'A', digits: 2 },
  { path: 'module.impA', label: 'Imp', unit: 'A', digits: 2 },
  { path: 'module.betaVocPctPerC', label: 'Voc coefficient', unit: '%/°C', digits: 2 },
  { path: 'module.betaVmpPctPerC', label: 'Vmp coefficient', unit: '%/°C', digits: 2 },
  { path: 'module.cellsInSeries', label: 'Cells in series' },
  { path: 'module.maxSystemV', label: 'System voltage, at most', unit: 'V' },
]

export const inverterFields: DesignFieldSpec[] = [
  { path: 'inverter.name', label: 'Inverter', isText: true },
  { path: 'inverter.ratedKw', label: 'Active power of each', unit: 'kW' },
  { path: 'inverter.mpptMinV', label: 'Tracking from', unit: 'V' },
  { path: 'inverter.mpptMaxV', label: 'Tracking to', unit: 'V' },
  { path: 'inverter.maxDcV', label: 'DC voltage, at most', unit: 'V' },
  { path: 'inverter.faultPerUnit', label: 'Fault current', unit: 'pu', digits: 2 },
]

export const siteFields: DesignFieldSpec[] = [
  { path: 'site.tMinC', label: 'Coldest air', unit: '°C' },
  { path: 'site.tCellHotC', label: 'Hottest cell', unit: '°C' },
  { path: 'albedo', label: 'Albedo of the ground', digits: 2 },
  { path: 'limitKeptBy', label: 'Limit kept by', isText: true },
]

export function transformerFields(index: number): DesignFieldSpec[] {
  const at = (key: string) => `transformers.${index}.${key}`
  return [
    { path: at('name'), label: 'Transformer', isText: true },
    { path: at('count'), label: 'How many' },
    { path: at('mva'), label: 'Self-cooled rating of each', unit: 'MVA', digits: 1 },
    { path: at('impedancePct'), label: 'Impedance', unit: '%', digits: 2 },
    { path: at('xOverR'), label: 'X over R' },
    { path: at('highKv'), label: 'High side', unit: 'kV' },
    { path: at('lowKv'), label: 'Low side', unit: 'kV' },
    { path: at('winding'), label: 'Winding', isText: true },
  ]
}

export const lossField = (index: number, name: string): DesignFieldSpec => ({
  path: `dcLosses.${index}.fraction`,
  label: name,
  ...percent,
})

/** A plain plant to start from where a project has no design yet; every figure is to be replaced. */
export const startingDesign: DesignBody = {
  module: {
    name: 'Module to be named',
    pmaxW: 550,
    vocV: 49.9,
    vmpV: 41.95,
    iscA: 14,
    impA: 13.11,
    betaVocPctPerC: -0.26,
    betaVmpPctPerC: -0.34,
    gammaPmaxPctPerC: -0.34,
    cellsInSeries: 72,
    maxSystemV: 1500,
  },
  modulesPerString: 26,
  strings: 480,
  mounting: {
    kind: 'single_axis_tracker',
    axisAzimuthDeg: 180,
    maxRotationDeg: 60,
    groundCoverRatio: 0.35,
    backtrack: true,
  },
  inverter: {
    name: 'Inverter to be named',
    count: 2,
    ratedKva: 2750,
    ratedKw: 2750,
    efficiency: 0.98,
    mpptMinV: 880,
    mpptMaxV: 1300,
    maxDcV: 1500,
    faultPerUnit: 1.2,
  },
  exportLimitMw: 5,
  limitKeptBy: 'plant controller at the POI meter',
  powerFactorAtPoi: 0.95,
  transformers: [
    {
      name: 'Pad-mount',
      count: 2,
      mva: 2.75,
      impedancePct: 5.75,
      xOverR: 8,
      highKv: 12.47,
      lowKv: 0.69,
      winding: 'Dyn',
    },
  ],
  acLossFraction: 0.02,
  dcLosses: [
    { name: 'Soiling and snow', fraction: 0.02 },
    { name: 'Mismatch', fraction: 0.02 },
    { name: 'DC wiring', fraction: 0.015 },
    { name: 'Degradation', fraction: 0.03 },
    { name: 'Availability', fraction: 0.03 },
  ],
  albedo: 0.2,
  site: { tMinC: -20, tCellHotC: 70 },
  models: {
    transposition: 'perez_1990',
    incidence: 'ashrae',
    cellTemperature: { model: 'faiman', u0: 25, u1: 6.84 },
  },
}
