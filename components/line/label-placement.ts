import {
  boxesOverlap,
  clamp,
  verticalCrosses,
  type Box,
  type Point,
} from '@/components/drawing/geometry'

/** A label to hang on a stop at `x`; the axis is y = 0 while labels are placed. */
export interface LabelWish {
  x: number
  side: 'above' | 'below'
  width: number
  height: number
}

export interface PlacedLabel {
  box: Box
  /** From the axis to the label: straight, or with one elbow. */
  leader: Point[]
}

export interface PlacementField {
  /** Nothing may leave these px. */
  left: number
  right: number
  /** Free height kept between axis and labels. */
  base: number
  /** Upright lines text should keep clear of, on both sides or above only. */
  uprights: { x: number; side: 'both' | 'above' }[]
}

const ROW = 17
const GAP_X = 9
const GAP_Y = 3
const COST = { row: 17, overUpright: 900, overLeader: 300, elbow: 45, future: 40 }

/**
 * Places labels so that no two share area: each takes the cheapest free place, where a place costs
 * for its distance, for lying on an upright and for crossing leaders; later sweeps let each move
 * once the others are known. Tried from either end, the cheaper whole is kept. Rows are unlimited,
 * so a free place always exists.
 */
export function placeLabels(wishes: readonly LabelWish[], field: PlacementField): PlacedLabel[] {
  const forward = wishes.map((_, i) => i)
  const tries = [forward, [...forward].reverse()].map((order) => sweepPlaces(order, wishes, field))
  const best = tries.reduce((a, b) => (b.cost < a.cost ? b : a))
  return best.placed.filter((label) => label !== undefined)
}

interface Placement {
  placed: (PlacedLabel | undefined)[]
  cost: number
}

function sweepPlaces(
  order: readonly number[],
  wishes: readonly LabelWish[],
  field: PlacementField,
): Placement {
  const placed: (PlacedLabel | undefined)[] = wishes.map(() => undefined)
  let cost = 0
  for (let sweep = 0; sweep < 4; sweep++) {
    cost = 0
    for (const i of order) {
      placed[i] = undefined
      const found = cheapest(i, wishes, placed, field)
      placed[i] = found?.label
      cost += found?.cost ?? 0
    }
  }
  return { placed, cost }
}

function cheapest(
  index: number,
  wishes: readonly LabelWish[],
  placed: readonly (PlacedLabel | undefined)[],
  field: PlacementField,
): { label: PlacedLabel; cost: number } | undefined {
  const wish = wishes[index]
  if (wish === undefined) return undefined
  const others = placed.filter((_, i) => wishes[i]?.side === wish.side)
  const neighbors = others.filter((label) => label !== undefined)
  const waiting = wishes.filter((w, i) => w.side === wish.side && i !== index && !placed[i])
  const lefts = leftEdges(wish, field)
  let best: PlacedLabel | undefined
  let bestCost = Infinity
  for (let row = 0; row * COST.row < bestCost; row++) {
    for (const left of lefts) {
      const label = labelAt(wish, left, row, field)
      if (neighbors.some((other) => boxesOverlap(label.box, other.box, GAP_X, GAP_Y))) continue
      const cost = row * COST.row + placeCost(wish, label, row, neighbors, waiting, field)
      if (cost < bestCost) [best, bestCost] = [label, cost]
    }
  }
  return best === undefined ? undefined : { label: best, cost: bestCost }
}

/** Left edges worth trying: centered, hung by either end, and just clear of each upright. */
function leftEdges(wish: LabelWish, field: PlacementField): number[] {
  const { x, width } = wish
  const tries = [0.5, 0.25, 0.75, 0, 1].map((share) => x - share * width)
  tries.push(x - 3, x + 3 - width, x + 6, x - 6 - width)
  for (const upright of field.uprights) tries.push(upright.x + 7, upright.x - 7 - width)
  const [low, high] = [field.left, Math.max(field.left, field.right - width)]
  const kept = tries.map((left) => clamp(left, low, high))
  return [...new Set(kept)].filter((left) => x > left - 26 && x < left + width + 26)
}

function labelAt(wish: LabelWish, left: number, row: number, field: PlacementField): PlacedLabel {
  const { x, width, height, side } = wish
  const off = field.base + row * ROW
  const y = side === 'below' ? off : -off - height
  const box = { x: left, y, width, height }
  const sign = side === 'below' ? 1 : -1
  const inside = x > left - 1 && x < left + width + 1
  if (inside)
    return {
      box,
      leader: [
        { x, y: 0 },
        { x, y: sign * (off - 2) },
      ],
    }
  const mid = y + Math.min(height / 2, 9)
  const edge = x <= left ? left - 3 : left + width + 3
  return {
    box,
    leader: [
      { x, y: 0 },
      { x, y: mid },
      { x: edge, y: mid },
    ],
  }
}

function placeCost(
  wish: LabelWish,
  label: PlacedLabel,
  row: number,
  neighbors: readonly PlacedLabel[],
  waiting: readonly LabelWish[],
  field: PlacementField,
): number {
  const { box, leader } = label
  const reach = leader[1]?.y ?? 0
  let cost = Math.abs(box.x + box.width / 2 - wish.x) * 0.12 + (leader.length > 2 ? COST.elbow : 0)
  for (const upright of field.uprights) {
    if (upright.side === 'above' && wish.side === 'below') continue
    if (upright.x > box.x - 5 && upright.x < box.x + box.width + 5) cost += COST.overUpright
  }
  for (const other of neighbors) {
    const theirs = other.leader[1]?.y ?? 0
    if (verticalCrosses(wish.x, 0, reach, other.box, 3)) cost += COST.overLeader
    if (verticalCrosses(other.leader[0]?.x ?? 0, 0, theirs, box, 3)) cost += COST.overLeader
  }
  for (const next of waiting) {
    if (next.x > box.x - 3 && next.x < box.x + box.width + 3) cost += COST.future / (row + 1)
  }
  return cost
}
