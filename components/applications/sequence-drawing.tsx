import { metrics } from '@/components/drawing/metrics'
import type { LineModel } from '@/components/line/model'
import { StepLineLarge } from '@/components/line/step-line-large'
import { StepLineTall } from '@/components/line/step-line-tall'
import { pagePalette } from '@/components/ui/page-palette'

/** Each form with the container widths it is shown at; classes are whole words for the style sheet. */
const wideForms = [
  { width: 1374, className: 'hidden @min-[1180px]:block' },
  { width: 1000, className: 'hidden @min-[860px]:block @min-[1180px]:hidden' },
  { width: 740, className: 'hidden @min-[640px]:block @min-[860px]:hidden' },
] as const

/**
 * The step line on its sheet. All forms come with the page and the style sheet shows the one that
 * fits, so that nothing is measured or moved after the first paint.
 */
export function SequenceDrawing({ model, title }: { model: LineModel; title: string }) {
  const common = { model, title, metrics, palette: pagePalette }
  return (
    <figure className="@container">
      <div className="border-rule bg-sheet overflow-hidden border [&_svg]:h-auto [&_svg]:w-full">
        {wideForms.map(({ width, className }) => (
          <div key={width} className={className}>
            <StepLineLarge {...common} width={width} />
          </div>
        ))}
        <div className="mx-auto max-w-[430px] @min-[640px]:hidden">
          <StepLineTall {...common} width={356} />
        </div>
      </div>
      <figcaption className="cap mt-2">
        Shows paperwork, not the state of equipment.{model.zoneNote ? ` ${model.zoneNote}` : ''}
      </figcaption>
    </figure>
  )
}
