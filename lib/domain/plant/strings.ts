/** Module and window data for string length. Voltages V, temperatures C, coefficients % per C. */
export interface StringInputs {
  vocV: number
  vmpV: number
  betaVocPctPerC: number
  betaVmpPctPerC: number
  tMinC: number
  tCellHotC: number
  systemMaxV: number
  trackingMinV: number
}

export interface StringLimits {
  vocColdV: number
  maxModules: number
  /** Open-circuit voltage of the longest string on the coldest day. */
  stringVocV: number
  vmpHotV: number
  minModules: number
  account: string
  source: string
}

/** Equality at a limit must not fail on rounding. */
const EPSILON = 1e-9

const SOURCE =
  'Temperature-coefficient method of the NEC 690.7(A) kind; tracking window by the same coefficients at the hot cell temperature'

/**
 * Longest string by cold open-circuit voltage and shortest by hot operating voltage.
 * Voc cold = Voc (1 + beta/100 (Tmin - 25)); longest = floor(limit / Voc cold);
 * Vmp hot = Vmp (1 + beta/100 (Tcell - 25)); shortest = ceil(tracking minimum / Vmp hot).
 * Source: pv-worked-examples.md section 9; the adopted code edition has to be checked.
 */
export function stringLimits(inputs: StringInputs): StringLimits {
  const vocColdV = voltageAt(inputs.vocV, inputs.betaVocPctPerC, inputs.tMinC)
  const vmpHotV = voltageAt(inputs.vmpV, inputs.betaVmpPctPerC, inputs.tCellHotC)
  const maxModules = Math.floor(inputs.systemMaxV / vocColdV + EPSILON)
  const minModules = Math.ceil(inputs.trackingMinV / vmpHotV - EPSILON)
  const limits = { vocColdV, maxModules, stringVocV: maxModules * vocColdV, vmpHotV, minModules }
  return { ...limits, account: accountOf(inputs, limits), source: SOURCE }
}

/** A voltage at a temperature, V, from its value at 25 C and its coefficient in % per C. */
export function voltageAt(volts: number, betaPctPerC: number, temperatureC: number): number {
  return volts * (1 + (betaPctPerC / 100) * (temperatureC - 25))
}

/** Whether a string of `modules` keeps both limits, with the sentence that says why. */
export function checkString(
  modules: number,
  inputs: StringInputs,
): { allowed: boolean; stringVocV: number; account: string } {
  const { vocColdV, minModules, maxModules } = stringLimits(inputs)
  const stringVocV = modules * vocColdV
  const cold = `${modules} in series reach ${volts(stringVocV)} at ${inputs.tMinC} °C`
  if (modules > maxModules) {
    const over = volts(stringVocV - inputs.systemMaxV)
    return {
      allowed: false,
      stringVocV,
      account: `${cold}, ${over} above the limit of ${volts(inputs.systemMaxV)}.`,
    }
  }
  if (modules < minModules) {
    return {
      allowed: false,
      stringVocV,
      account: `${modules} in series fall below the tracking minimum of ${volts(inputs.trackingMinV)} at ${inputs.tCellHotC} °C cell; at least ${minModules}.`,
    }
  }
  return { allowed: true, stringVocV, account: `${cold}, limit ${volts(inputs.systemMaxV)}.` }
}

function accountOf(inputs: StringInputs, limits: Omit<StringLimits, 'account' | 'source'>): string {
  const { maxModules, minModules, vocColdV, vmpHotV } = limits
  const next = volts((maxModules + 1) * vocColdV)
  const longest = `At ${inputs.tMinC} °C a module gives ${volts(vocColdV)} open-circuit: ${maxModules} in series make ${volts(limits.stringVocV)} of ${volts(inputs.systemMaxV)}, ${maxModules + 1} would make ${next}.`
  const shortest = `At ${inputs.tCellHotC} °C cell it works at ${volts(vmpHotV)}: at least ${minModules} in series for ${volts(inputs.trackingMinV)}.`
  const none = minModules > maxModules ? ' No string length keeps both limits.' : ''
  return `${longest} ${shortest}${none}`
}

function volts(value: number): string {
  return `${value.toLocaleString('en-US', { minimumFractionDigits: 1, maximumFractionDigits: 1 })} V`
}
