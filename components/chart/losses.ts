import { energyFigure, figure } from '@/components/chart/scale'
import type { OneLineKind } from '@/components/drawing/one-line-model'
import type { Palette } from '@/components/drawing/palette'
import type { Metrics } from '@/components/drawing/text'

/** A place on the one-line, its energy, and the losses on the way to the next place. */
export interface LossPlace {
  kind: OneLineKind
  title: string
  energyKwh?: number
  /** In the order they are taken; fractions of what arrives at each. */
  losses: readonly { label: string; fraction: number; clips?: boolean }[]
}

export interface LossChainProps {
  /** From the array to the POI; the last one's losses are not drawn. */
  places: readonly LossPlace[]
  width: number
  palette: Palette
  metrics: Metrics
}

/** The losses between a place and the next; none after the last. */
export function drawnLosses(places: readonly LossPlace[], i: number): LossPlace['losses'] {
  return i === places.length - 1 ? [] : (places[i]?.losses ?? [])
}

/** `−2.0 %` for a fraction of 0.02. */
export function lossFigure(fraction: number): string {
  return `${figure(-100 * fraction, 1)} %`
}

/** The chain in words. */
export function describeLosses(places: readonly LossPlace[]): string {
  return places
    .map((place, i) => {
      const energy = place.energyKwh === undefined ? '' : ` ${energyFigure(place.energyKwh)}`
      const losses = drawnLosses(places, i).map((l) => `${l.label} ${lossFigure(l.fraction)}`)
      return [`${place.title}${energy}`, ...losses].join(', ')
    })
    .join('; ')
}
