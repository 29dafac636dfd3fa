import type { ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { ClippingCurve } from '@/components/chart/clipping-curve'
import { DurationCurve } from '@/components/chart/duration-curve'
import { HourMonthGrid } from '@/components/chart/hour-month-grid'
import { metrics } from '@/components/drawing/metrics'
import { OneLine } from '@/components/drawing/one-line'
import { printPalette } from '@/components/drawing/palette'
import { docxBytes } from '@/lib/documents/docx-bytes'
import { drawPicture } from '@/lib/documents/png'
import type { ExhibitSource } from '@/lib/domain/exhibits'
import { oneLineOfDesign, trimmed } from '@/lib/domain/one-line-of-design'
import { figuresOf } from '@/lib/domain/plant/design'
import type { Picture } from '@/templates/exhibits/_parts/picture'
import { contentWidth, fallbacks } from '@/templates/exhibits/_parts/theme'
import { exhibitC, type ExhibitCPictures } from '@/templates/exhibits/exhibit-c'
import { exhibitCContent } from '@/templates/exhibits/exhibit-c-content'

const look = { palette: printPalette, metrics }

/** Width of the text and of half of it, less the gutter; CSS px of 1/96 inch. */
const full = contentWidth / 15
const half = full / 2 - 8

/**
 * The DOCX of Exhibit C. The same revision gives the same bytes: no clock, no counter of the
 * process, no font of the machine has a part in them.
 */
export async function renderExhibitC(
  source: ExhibitSource,
  previous: ExhibitSource | null,
): Promise<Uint8Array> {
  const content = exhibitCContent(source, previous)
  const { prepared, checked } = source.data
  return docxBytes(exhibitC(content, picturesOf(source)), {
    at: new Date(`${(checked ?? prepared).on}T12:00:00Z`),
    fallbacks,
  })
}

function picturesOf(source: ExhibitSource): ExhibitCPictures {
  return {
    oneLine: pictureOf(
      <OneLine
        elements={oneLineOfDesign(source.design, source.data.terms)}
        width={full}
        {...look}
      />,
    ),
    clipping: pictureOf(clippingCurve(source)),
    duration: pictureOf(durationCurve(source)),
    hours: pictureOf(
      <HourMonthGrid
        kwhByHourAndMonth={source.result.clippedByHourAndMonth}
        title="Clipped energy by hour of the day and month"
        width={full}
        height={250}
        {...look}
      />,
    ),
  }
}

function clippingCurve({ result, design }: ExhibitSource): ReactElement {
  const { annual, poiRatios } = result
  return (
    <ClippingCurve
      points={poiRatios.map((one) => ({
        ratio: one.dcPerPoi,
        lostFraction: one.limitedFraction,
      }))}
      at={{
        ratio: annual.dcPerPoiKw ?? figuresOf(design).dcPerPoi,
        lostFraction: annual.limitedFraction,
      }}
      ratioName="array over export limit"
      width={half}
      height={250}
      {...look}
    />
  )
}

function durationCurve({ result, design }: ExhibitSource): ReactElement {
  const { annual } = result
  const inverterMw = figuresOf(design).inverterMw * (1 - design.acLossFraction)
  const limits = [
    {
      kw: design.exportLimitMw * 1000,
      label: `${trimmed(design.exportLimitMw, 1)} MW export limit`,
      clips: annual.poiCurtailedKwh > 0,
    },
    {
      kw: inverterMw * 1000,
      label: `${inverterMw.toFixed(inverterMw < 10 ? 2 : 1)} MW inverters, at the POI`,
      clips: annual.inverterClippedKwh > 0,
    },
  ]
  return (
    <DurationCurve
      points={result.durationCurve}
      limits={limits}
      clippedKwh={annual.poiCurtailedKwh + annual.inverterClippedKwh}
      clippedHours={Math.max(annual.hoursAtPoiLimit, annual.hoursAtInverterLimit)}
      width={half}
      height={250}
      {...look}
    />
  )
}

/** A drawing with the name and the words it carries for those who do not see it. */
function pictureOf(drawing: ReactElement): Picture {
  const svg = renderToStaticMarkup(drawing)
  const words = (tag: 'title' | 'desc') =>
    unescaped(new RegExp(`<${tag}>([^]*?)</${tag}>`).exec(svg)?.[1] ?? '')
  return { ...drawPicture(svg), title: words('title'), description: words('desc') }
}

function unescaped(text: string): string {
  const signs: Record<string, string> = {
    '&lt;': '<',
    '&gt;': '>',
    '&quot;': '"',
    '&#x27;': "'",
    '&amp;': '&',
  }
  return text.replace(/&(lt|gt|quot|#x27|amp);/g, (sign) => signs[sign] ?? sign)
}
