import { neededInverterKva, type NeededKva } from '@/lib/domain/plant/reactive'
import type { Mounting, Plant } from '@/lib/domain/plant/plant'
import { stringLimits, type StringInputs, type StringLimits } from '@/lib/domain/plant/strings'

/** Data sheet of a module at standard test conditions; coefficients in % per C. */
export interface DesignModule {
  name: string
  pmaxW: number
  vocV: number
  vmpV: number
  iscA: number
  impA: number
  betaVocPctPerC: number
  betaVmpPctPerC: number
  gammaPmaxPctPerC: number
  /** Half-cut modules print twice as many cells as stand in series. */
  cellsInSeries: number
  maxSystemV: number
}

/** Inverters of one kind; ratings are of one of them. */
export interface DesignInverter {
  name: string
  count: number
  ratedKva: number
  ratedKw: number
  /** Nominal efficiency, 0 to 1. */
  efficiency: number
  mpptMinV: number
  mpptMaxV: number
  maxDcV: number
  faultPerUnit: number
}

/** Equal transformers in parallel; ratings are of one of them, impedance on its self-cooled MVA. */
export interface DesignTransformer {
  name: string
  count: number
  mva: number
  impedancePct: number
  xOverR: number
  highKv: number
  lowKv: number
  winding: string
}

/** A plant as it is designed: one array, one kind of inverter, transformers from the POI inward. */
export interface Design {
  module: DesignModule
  modulesPerString: number
  strings: number
  mounting: Mounting
  inverter: DesignInverter
  exportLimitMw: number
  /** How the limit at the POI is kept, in words. */
  limitKeptBy: string
  powerFactorAtPoi: number
  transformers: DesignTransformer[]
  acLossFraction: number
  dcLosses: { name: string; fraction: number }[]
  albedo: number
  /** Coldest design temperature of the air and hottest of the cell. */
  site: { tMinC: number; tCellHotC: number }
  models: Pick<Plant, 'transposition' | 'incidence' | 'cellTemperature'>
}

/** Nameplate at standard test conditions, kW: modules times their rated power. */
export function dcKwOf(design: Design): number {
  return (design.module.pmaxW * design.modulesPerString * design.strings) / 1000
}

/** Losses one after the other: 1 minus the product of what each keeps. 0 to 1. */
export function dcLossFractionOf(losses: readonly { fraction: number }[]): number {
  return 1 - losses.reduce((kept, loss) => kept * (1 - loss.fraction), 1)
}

/** The plant of the energy chain that a design stands for; pages, worker and server use this one. */
export function plantOf(design: Design): Plant {
  const { inverter, models, mounting, albedo, acLossFraction } = design
  return {
    dcKw: dcKwOf(design),
    inverterAcKw: inverter.count * inverter.ratedKw,
    inverterEfficiency: inverter.efficiency,
    poiLimitKw: design.exportLimitMw * 1000,
    acLossFraction,
    mounting,
    dcLossFraction: dcLossFractionOf(design.dcLosses),
    gammaPerC: design.module.gammaPmaxPctPerC / 100,
    albedo,
    transposition: models.transposition,
    incidence: models.incidence,
    cellTemperature: models.cellTemperature,
  }
}

/** What `stringLimits` asks, the lower of the module's and the inverter's voltage as the limit. */
export function stringInputsOf(design: Design): StringInputs {
  const { module, inverter, site } = design
  return {
    vocV: module.vocV,
    vmpV: module.vmpV,
    betaVocPctPerC: module.betaVocPctPerC,
    betaVmpPctPerC: module.betaVmpPctPerC,
    tMinC: site.tMinC,
    tCellHotC: site.tCellHotC,
    systemMaxV: Math.min(module.maxSystemV, inverter.maxDcV),
    trackingMinV: inverter.mpptMinV,
  }
}

/** Figures that follow from a design without any weather. */
export interface DesignFigures {
  dcMw: number
  /** Array over export limit, and array over inverter kW. */
  dcPerPoi: number
  dcPerInverter: number
  inverterMw: number
  inverterMva: number
  dcLossFraction: number
  strings: StringLimits
  needed: NeededKva
  /** Installed less needed, MVA; below 0 the power factor cannot be held at full export. */
  spareMva: number
}

/** Nameplate, both DC/AC ratios, longest string and the apparent power needed at the inverters. */
export function figuresOf(design: Design): DesignFigures {
  const { inverter, exportLimitMw } = design
  const dcMw = dcKwOf(design) / 1000
  const inverterMw = (inverter.count * inverter.ratedKw) / 1000
  const inverterMva = (inverter.count * inverter.ratedKva) / 1000
  const needed = neededInverterKva({
    limitKw: exportLimitMw * 1000,
    powerFactorAtPoi: design.powerFactorAtPoi,
    acLossFraction: design.acLossFraction,
    transformers: design.transformers.map((one) => ({
      ratedKva: one.count * one.mva * 1000,
      impedancePct: one.impedancePct,
      xOverR: one.xOverR,
    })),
  })
  return {
    dcMw,
    dcPerPoi: dcMw / exportLimitMw,
    dcPerInverter: dcMw / inverterMw,
    inverterMw,
    inverterMva,
    dcLossFraction: dcLossFractionOf(design.dcLosses),
    strings: stringLimits(stringInputsOf(design)),
    needed,
    spareMva: inverterMva - needed.inverterKva / 1000,
  }
}
