import {
  describeLosses,
  lossFigure,
  type LossChainProps,
  type LossPlace,
} from '@/components/chart/losses'
import { energyFigure } from '@/components/chart/scale'
import { px } from '@/components/drawing/geometry'
import type { Palette } from '@/components/drawing/palette'
import { Label, Sheet } from '@/components/drawing/sheet'
import { halfAlong, OneLineSymbol } from '@/components/drawing/symbols'
import { wrapText } from '@/components/drawing/text'
import { Arrows } from '@/components/line/dimension-line'

const AXIS_X = 34
const CHAIN_X = 74
const TEXT_X = 86
const LEAD = 15

interface LossRow {
  y1: number
  y2: number
  name: string[]
  fraction: number
  clips: boolean
}

interface PlaceRow {
  place: LossPlace
  y: number
}

function layout({ places, width, metrics }: LossChainProps) {
  const placeRows: PlaceRow[] = []
  const lossRows: LossRow[] = []
  let y = 40
  places.forEach((place, i) => {
    placeRows.push({ place, y })
    y += 26
    if (i === places.length - 1) return
    for (const loss of place.losses) {
      const name = wrapText(loss.label, 'sans400', 12, width - TEXT_X - 70, metrics)
      const y2 = y + Math.max(30, name.length * LEAD + 10)
      lossRows.push({ y1: y, y2, name, fraction: loss.fraction, clips: loss.clips === true })
      y = y2
    }
    y += 26
  })
  return { placeRows, lossRows, height: y + 4 }
}

/** The loss chain running downward, for narrow screens. */
export function LossChainDown(props: LossChainProps) {
  const { places, width, palette } = props
  const { placeRows, lossRows, height } = layout(props)
  const line = placeRows.slice(0, -1).map((row, i) => {
    const next = placeRows[i + 1] ?? row
    const from = row.y + halfAlong(row.place.kind, true)
    return `M${AXIS_X} ${px(from)} V${px(next.y - halfAlong(next.place.kind, true))}`
  })
  return (
    <Sheet
      width={width}
      height={height}
      title="Losses from array to POI"
      desc={describeLosses(places)}
    >
      <path d={line.join(' ')} stroke={palette.ink} strokeWidth={1.7} />
      {placeRows.map((row) => (
        <Place key={row.place.title} row={row} width={width} palette={palette} />
      ))}
      {lossRows.map((row, i) => (
        <Loss key={i} row={row} width={width} palette={palette} />
      ))}
    </Sheet>
  )
}

function Place({ row, width, palette }: { row: PlaceRow; width: number; palette: Palette }) {
  const { place, y } = row
  return (
    <g>
      <OneLineSymbol kind={place.kind} x={AXIS_X} y={y} palette={palette} downward />
      <Label
        x={TEXT_X}
        y={y + 4}
        text={place.title}
        face="sans600"
        size={13}
        fill={palette.ink}
        palette={palette}
      />
      {place.energyKwh === undefined ? null : (
        <Label
          x={width - 6}
          y={y + 4}
          text={energyFigure(place.energyKwh)}
          face="mono400"
          size={12}
          fill={palette.ink}
          palette={palette}
          anchor="end"
        />
      )}
    </g>
  )
}

function Loss({ row, width, palette }: { row: LossRow; width: number; palette: Palette }) {
  const { y1, y2, name, fraction, clips } = row
  const color = clips ? palette.copper : palette.ink2
  const middle = (y1 + y2) / 2 + 4
  const end = `M${CHAIN_X - 18} ${px(y1)} h24 M${CHAIN_X - 18} ${px(y2)} h24`
  return (
    <g>
      <path d={end} stroke={palette.ink3} strokeWidth={0.9} />
      <g transform="matrix(0 1 1 0 0 0)">
        <Arrows x1={y1} x2={y2} y={CHAIN_X} stroke={color} strokeWidth={1.1} />
      </g>
      {name.map((line, i) => (
        <Label
          key={line}
          x={TEXT_X}
          y={middle + (i - (name.length - 1) / 2) * LEAD}
          text={line}
          face="sans400"
          size={12}
          fill={color}
          palette={palette}
        />
      ))}
      <Label
        x={width - 6}
        y={middle}
        text={lossFigure(fraction)}
        face="mono400"
        size={12}
        fill={color}
        palette={palette}
        anchor="end"
      />
    </g>
  )
}
