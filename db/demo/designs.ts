import type { DesignBody } from '@/lib/schemas/design'
import type { SyntheticYearInput } from '@/lib/schemas/plant'

/** Everything here is invented: makers, sheets, sites and weather. */

export type DemoWeather = 'mountain' | 'plains' | 'eastern'

const months = (ghi: number[], dryBulb: number[], wind: number) =>
  ghi.map((ghiKwhPerM2Day, i) => ({ ghiKwhPerM2Day, dryBulbC: dryBulb[i]!, windMPerS: wind }))

/** Synthetic years from invented means; no station stands behind them. */
export const demoWeather: Record<DemoWeather, SyntheticYearInput> = {
  mountain: {
    site: {
      stationId: 'SYN-SORREL-WELLS',
      name: 'Synthetic year, Sorrel Wells',
      region: 'mountain',
      latitudeDeg: 39.4,
      longitudeDeg: -111.2,
      elevationM: 1510,
      utcOffsetHours: -7,
    },
    months: months(
      [1.95, 2.85, 4.55, 5.7, 6.75, 7.6, 6.65, 6.05, 4.75, 3.35, 2.1, 1.75],
      [-3, 0, 5, 10, 15, 20, 25, 24, 17, 10, 3, -3],
      3.5,
    ),
  },
  plains: {
    site: {
      stationId: 'SYN-VANTRY',
      name: 'Synthetic year, Vantry',
      region: 'plains',
      latitudeDeg: 38.1,
      longitudeDeg: -99.3,
      elevationM: 640,
      utcOffsetHours: -6,
    },
    months: months(
      [2.3, 3.1, 4.3, 5.4, 6.1, 6.8, 6.9, 6.1, 5.0, 3.8, 2.6, 2.1],
      [-1, 2, 7, 13, 18, 24, 27, 26, 21, 14, 6, 0],
      4.6,
    ),
  },
  eastern: {
    site: {
      stationId: 'SYN-DUNMARROW',
      name: 'Synthetic year, Dunmarrow',
      region: 'eastern',
      latitudeDeg: 42.3,
      longitudeDeg: -76.1,
      elevationM: 290,
      utcOffsetHours: -5,
    },
    months: months(
      [1.6, 2.4, 3.5, 4.4, 5.3, 5.8, 5.8, 5.0, 3.9, 2.6, 1.6, 1.3],
      [-5, -4, 1, 8, 14, 19, 22, 21, 16, 10, 4, -2],
      3.1,
    ),
  },
}

const halden580: DesignBody['module'] = {
  name: 'Halden 580B',
  pmaxW: 580,
  vocV: 51.6,
  vmpV: 43.3,
  iscA: 14.2,
  impA: 13.4,
  betaVocPctPerC: -0.25,
  betaVmpPctPerC: -0.3,
  gammaPmaxPctPerC: -0.3,
  cellsInSeries: 72,
  maxSystemV: 1500,
}

const central = (ratedKva: number, efficiency = 0.987, faultPerUnit = 1.15) => ({
  name: `Corvane C-${ratedKva}`,
  ratedKva,
  ratedKw: ratedKva,
  efficiency,
  mpptMinV: 880,
  mpptMaxV: 1300,
  maxDcV: 1500,
  faultPerUnit,
})
const c3150 = central(3150, 0.986, 1.2)
const c4200 = central(4200)
const sedge = (ratedKva: number, ratedKw: number) => ({
  ...central(ratedKva, 0.985, 1.1),
  name: `Sedge ${ratedKva}`,
  ratedKw,
})

const padMount = (count: number, mva = 4.4, highKv = 34.5, lowKv = 0.69) => ({
  name: 'Pad-mount',
  count,
  mva,
  impedancePct: 5.75,
  xOverR: 8,
  highKv,
  lowKv,
  winding: 'Dyn',
})
const main = (mva: number, highKv: number, impedancePct = 8, count = 1) => ({
  name: count > 1 ? 'Main transformers' : 'Main transformer',
  count,
  mva,
  impedancePct,
  xOverR: 28,
  highKv,
  lowKv: 34.5,
  winding: 'YNyn with delta tertiary',
})

/** What all of them share; a project's design states what differs. */
const common = {
  module: halden580,
  mounting: {
    kind: 'single_axis_tracker' as const,
    axisAzimuthDeg: 180,
    maxRotationDeg: 60,
    groundCoverRatio: 0.35,
    backtrack: true,
  },
  limitKeptBy: 'plant controller at the POI meter',
  powerFactorAtPoi: 0.95,
  acLossFraction: 0.019,
  dcLosses: [
    { name: 'Soiling and snow', fraction: 0.02 },
    { name: 'Mismatch', fraction: 0.02 },
    { name: 'DC wiring', fraction: 0.015 },
    { name: 'First-light degradation', fraction: 0.015 },
    { name: 'Age, mean of the first years', fraction: 0.02 },
    { name: 'Availability', fraction: 0.0275 },
  ],
  albedo: 0.2,
  models: {
    transposition: 'perez_1990' as const,
    incidence: 'ashrae' as const,
    cellTemperature: { model: 'faiman' as const, u0: 25, u1: 6.84 },
  },
}
const mountain = { tMinC: -24, tCellHotC: 70 }
const plains = { tMinC: -20, tCellHotC: 70 }
const eastern = { tMinC: -18, tCellHotC: 65 }

export interface DemoRevision {
  /** Days before today. */
  daysAgo: number
  note: string
  weather: DemoWeather
  body: DesignBody
  /** How many days after the revision its calculation was frozen; absent where none was. */
  frozenAfterDays?: number
}

export interface DemoDesign {
  project: string
  /** In order; the first is revision 1. */
  revisions: DemoRevision[]
}

const juniper = (change: Partial<DesignBody>): DesignBody => ({
  ...common,
  modulesPerString: 25,
  strings: 4303,
  inverter: { ...c4200, count: 14 },
  exportLimitMw: 48,
  transformers: [main(36, 69, 8.5), padMount(14)],
  site: mountain,
  ...change,
})
const juniperOld = {
  inverter: { ...c3150, count: 16 },
  transformers: [main(36, 69, 8.5), padMount(16, 3.3, 34.5, 0.66)],
}

/** Design revisions and frozen calculations of the demo's projects, by the project's name. */
export const demoDesigns: DemoDesign[] = [
  {
    project: 'Juniper Flat',
    revisions: [
      {
        daysAgo: 320,
        note: 'First layout, before the survey',
        weather: 'mountain',
        body: juniper({ ...juniperOld, modulesPerString: 24, strings: 4160 }),
        frozenAfterDays: 1,
      },
      {
        daysAgo: 262,
        note: 'Rows moved after the survey',
        weather: 'mountain',
        body: juniper({ ...juniperOld, strings: 4160 }),
        frozenAfterDays: 2,
      },
      {
        daysAgo: 205,
        note: 'As filed: 16 inverters of 3.15 MVA',
        weather: 'mountain',
        body: juniper(juniperOld),
        frozenAfterDays: 1,
      },
      {
        daysAgo: 24,
        note: 'Inverters of 4.2 MVA, so that 0.95 at the POI is held at full export',
        weather: 'mountain',
        body: juniper({}),
        frozenAfterDays: 1,
      },
    ],
  },
  {
    project: 'Mesa Larga',
    revisions: [
      {
        daysAgo: 410,
        note: 'As filed',
        weather: 'plains',
        body: {
          ...common,
          modulesPerString: 26,
          strings: 17_640,
          inverter: { ...c4200, count: 54 },
          exportLimitMw: 200,
          transformers: [main(90, 345, 9, 2), padMount(54)],
          site: plains,
        },
        frozenAfterDays: 2,
      },
      {
        daysAgo: 150,
        note: 'For the restudy',
        weather: 'plains',
        body: {
          ...common,
          modulesPerString: 26,
          strings: 18_302,
          inverter: { ...c4200, count: 56 },
          exportLimitMw: 200,
          transformers: [main(90, 345, 9, 2), padMount(56)],
          site: plains,
        },
        frozenAfterDays: 1,
      },
    ],
  },
  {
    project: 'Quarry Nine',
    revisions: [
      {
        daysAgo: 500,
        note: 'As in the agreement',
        weather: 'plains',
        body: {
          ...common,
          modulesPerString: 26,
          strings: 8528,
          inverter: { ...c4200, count: 26 },
          exportLimitMw: 96,
          transformers: [main(84, 138), padMount(26)],
          acLossFraction: 0.018,
          site: plains,
        },
      },
    ],
  },
  {
    project: 'Cold Spring Road',
    revisions: [
      {
        daysAgo: 75,
        note: 'As filed',
        weather: 'eastern',
        body: {
          ...common,
          mounting: { kind: 'fixed', tiltDeg: 25, azimuthDeg: 180 },
          modulesPerString: 26,
          strings: 232,
          inverter: { ...sedge(385, 350), count: 8 },
          exportLimitMw: 2.8,
          transformers: [padMount(2, 1.5, 13.2, 0.8)],
          acLossFraction: 0.015,
          site: eastern,
        },
        frozenAfterDays: 1,
      },
    ],
  },
  {
    project: 'Linnet Hollow',
    revisions: [
      {
        daysAgo: 390,
        note: 'As built',
        weather: 'eastern',
        body: {
          ...common,
          mounting: { kind: 'fixed', tiltDeg: 25, azimuthDeg: 180 },
          modulesPerString: 26,
          strings: 156,
          inverter: { ...sedge(125, 125), count: 16 },
          exportLimitMw: 2,
          limitKeptBy: 'inverter ratings',
          powerFactorAtPoi: 1,
          transformers: [padMount(1, 2.5, 13.2, 0.6)],
          acLossFraction: 0.015,
          site: eastern,
        },
      },
    ],
  },
  {
    project: 'Goshawk Prairie',
    revisions: [
      {
        daysAgo: 18,
        note: 'Solar part; the 50 MW of storage asked for is kept out of these figures',
        weather: 'plains',
        body: {
          ...common,
          modulesPerString: 26,
          strings: 8886,
          inverter: { ...c4200, count: 27 },
          exportLimitMw: 100,
          transformers: [main(84, 161), padMount(27)],
          site: plains,
        },
        frozenAfterDays: 1,
      },
    ],
  },
  {
    project: 'Sable Orchard',
    revisions: [
      {
        daysAgo: 96,
        note: 'As filed',
        weather: 'mountain',
        body: {
          ...common,
          modulesPerString: 25,
          strings: 441,
          inverter: { ...central(2800), count: 2 },
          exportLimitMw: 5,
          transformers: [padMount(2, 2.8)],
          acLossFraction: 0.015,
          site: mountain,
        },
      },
    ],
  },
]
