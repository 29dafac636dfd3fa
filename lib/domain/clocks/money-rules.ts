import type { Terms } from '@/lib/domain/clocks/facts'
import type { MoneyRule, MwBracket } from '@/lib/domain/clocks/procedure'
import { percentOf, sayDollars, scaled, wattsOf } from '@/lib/domain/money'

/** What a money rule is worked out from. */
export interface MoneyGround {
  terms: Pick<Terms, 'requestedMw' | 'studiedMw' | 'grantedMw' | 'installedMw'>
  /** Network upgrade cost assigned to the request; null while no study assigned any. */
  assignedCostMinor: number | null
}

export interface MoneyTarget {
  /** The total to reach, minor units. */
  targetMinor: number
  /** What is held on its account already. */
  heldMinor: number
  /** What is still to post: never below nothing. */
  topUpMinor: number
  /** How it comes out, in words that can be checked by hand. */
  account: string
}

interface Worked {
  amountMinor: number
  words: string
}

const wattsPerMw = 1_000_000n
const wattsPerKw = 1_000n

/**
 * The amount a rule asks for in minor units, exact to the cent; null while the megawatts or the
 * assigned cost it needs are not known.
 */
export function moneyAmount(rule: MoneyRule, ground: MoneyGround): number | null {
  return worked(rule, ground)?.amountMinor ?? null
}

/** The total to reach, what is held, and what is left to post; null while it cannot be told. */
export function moneyTarget(
  rule: MoneyRule,
  ground: MoneyGround,
  heldMinor: number,
): MoneyTarget | null {
  const found = worked(rule, ground)
  if (!found) return null
  const topUpMinor = Math.max(0, found.amountMinor - heldMinor)
  const rest =
    heldMinor === 0
      ? ''
      : ` Held ${sayDollars(heldMinor)}, so ${topUpMinor === 0 ? 'nothing' : sayDollars(topUpMinor)} is left to post.`
  return {
    targetMinor: found.amountMinor,
    heldMinor,
    topUpMinor,
    account: `${found.words}.${rest}`,
  }
}

function worked(rule: MoneyRule, ground: MoneyGround): Worked | null {
  switch (rule.kind) {
    case 'fixed':
      return { amountMinor: rule.amountMinor, words: sayDollars(rule.amountMinor) }
    case 'share':
      return shareOf(rule.percent, ground.assignedCostMinor)
    case 'multiple': {
      const base = worked(rule.of, ground)
      if (!base) return null
      const amountMinor = base.amountMinor * rule.times
      return { amountMinor, words: `${rule.times} × (${base.words}) = ${sayDollars(amountMinor)}` }
    }
    default:
      return byCapacity(rule, ground)
  }
}

function shareOf(percent: number, assignedMinor: number | null): Worked | null {
  if (assignedMinor === null) return null
  const amountMinor = percentOf(assignedMinor, percent)
  const words = `${percent} % of ${sayDollars(assignedMinor)} assigned = ${sayDollars(amountMinor)}`
  return { amountMinor, words }
}

type CapacityRule = Extract<MoneyRule, { kind: 'per_mw' | 'per_kw' | 'bracketed' }>

function byCapacity(rule: CapacityRule, { terms }: MoneyGround): Worked | null {
  const megawatts = terms[rule.mw ?? 'requestedMw']
  if (megawatts === undefined || !Number.isFinite(megawatts)) return null
  if (rule.kind === 'per_kw') {
    const { perKwMinor, plusMinor = 0 } = rule
    const variable = scaled(perKwMinor, wattsOf(megawatts), wattsPerKw)
    const words = `${sayDollars(perKwMinor)} per kW × ${Math.round(megawatts * 1e6) / 1e3} kW`
    return added(plusMinor, variable, words)
  }
  if (rule.kind === 'bracketed') return inBracket(bracketOf(rule.brackets, megawatts), megawatts)
  const plain = perMegawatt(rule.plusMinor ?? 0, rule.perMwMinor, megawatts)
  const { atLeastMinor = 0, atMostMinor = Number.MAX_SAFE_INTEGER } = rule
  if (plain.amountMinor < atLeastMinor)
    return {
      amountMinor: atLeastMinor,
      words: `${plain.words}, at least ${sayDollars(atLeastMinor)}`,
    }
  if (plain.amountMinor > atMostMinor)
    return { amountMinor: atMostMinor, words: `${plain.words}, at most ${sayDollars(atMostMinor)}` }
  return plain
}

/** The edge belongs to the bracket above it: at 80.0 MW the one "below 80" no longer holds. */
function bracketOf(brackets: readonly MwBracket[], megawatts: number): MwBracket | undefined {
  return brackets.find(
    ({ belowMw }) => belowMw === undefined || wattsOf(megawatts) < wattsOf(belowMw),
  )
}

function inBracket(bracket: MwBracket | undefined, megawatts: number): Worked | null {
  if (!bracket) return null
  const { belowMw, plusMinor = 0, perMwMinor = 0 } = bracket
  const where = belowMw === undefined ? 'the last bracket' : `below ${belowMw} MW`
  const found = perMegawatt(plusMinor, perMwMinor, megawatts)
  return { ...found, words: `${megawatts} MW is in ${where}: ${found.words}` }
}

function perMegawatt(plusMinor: number, perMwMinor: number, megawatts: number): Worked {
  const variable = scaled(perMwMinor, wattsOf(megawatts), wattsPerMw)
  return added(plusMinor, variable, `${sayDollars(perMwMinor)} per MW × ${megawatts} MW`)
}

function added(plusMinor: number, variableMinor: number, words: string): Worked {
  const amountMinor = plusMinor + variableMinor
  if (variableMinor === 0) return { amountMinor, words: sayDollars(amountMinor) }
  const plus = plusMinor === 0 ? '' : `${sayDollars(plusMinor)} + `
  return { amountMinor, words: `${plus}${words} = ${sayDollars(amountMinor)}` }
}

/** What is wrong with a rule, each in words; empty when it can be worked out. */
export function moneyRuleFaults(rule: MoneyRule): string[] {
  switch (rule.kind) {
    case 'fixed':
      return amounts({ amountMinor: rule.amountMinor })
    case 'share':
      return rule.percent > 0 && rule.percent <= 100
        ? []
        : [`Found ${rule.percent} %; allowed is more than 0 up to 100.`]
    case 'multiple':
      return [
        ...(Number.isInteger(rule.times) && rule.times > 0
          ? []
          : [`Found ${rule.times} times; allowed are whole numbers from 1.`]),
        ...moneyRuleFaults(rule.of),
      ]
    case 'per_kw':
      return amounts({ perKwMinor: rule.perKwMinor, plusMinor: rule.plusMinor })
    case 'per_mw': {
      const { perMwMinor, plusMinor, atLeastMinor, atMostMinor } = rule
      const turned = (atLeastMinor ?? 0) > (atMostMinor ?? Number.MAX_SAFE_INTEGER)
      return [
        ...amounts({ perMwMinor, plusMinor, atLeastMinor, atMostMinor }),
        ...(turned ? ['The least is above the most.'] : []),
      ]
    }
    case 'bracketed':
      return bracketFaults(rule.brackets)
  }
}

function bracketFaults(brackets: readonly MwBracket[]): string[] {
  const edges = brackets.map(({ belowMw }) => belowMw)
  const rising = edges.every((edge, at) => at === 0 || edge === undefined || edge > edges[at - 1]!)
  const open = edges.filter((edge) => edge === undefined).length
  return [
    ...brackets.flatMap(({ plusMinor, perMwMinor }) => amounts({ plusMinor, perMwMinor })),
    ...(rising ? [] : ['The brackets must rise by their upper edges.']),
    ...(open === 1 && edges.at(-1) === undefined
      ? []
      : ['The last bracket, and only it, has no upper edge.']),
  ]
}

function amounts(named: Record<string, number | undefined>): string[] {
  return Object.entries(named)
    .filter(([, minor]) => minor !== undefined && !(Number.isSafeInteger(minor) && minor >= 0))
    .map(([name, minor]) => `${name}: found ${minor}; allowed are whole minor units from 0.`)
}
