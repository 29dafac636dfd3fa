import type { ReactNode } from 'react'
import { Mark } from '@/components/drawing/mark'
import { LineDrawing } from '@/components/sign-in/line-drawing'
import { pagePalette } from '@/components/ui/page-palette'

interface DoorSheetProps {
  /** Name of the sheet: the page's heading. */
  title: string
  /** One sentence under the heading. */
  lead?: ReactNode
  children: ReactNode
}

/** The pages outside the product: one drawing sheet with its frame, the form and a title block. */
export function DoorSheet({ title, lead, children }: DoorSheetProps) {
  return (
    <main className="grid min-h-dvh p-3 sm:p-6">
      <div className="border-ink bg-sheet grid border-[1.5px] max-lg:grid-rows-[auto_1fr_auto] lg:grid-cols-[minmax(0,1fr)_minmax(24rem,31rem)] lg:grid-rows-[1fr_auto]">
        <Drawing />
        <section className="lg:border-ink px-5 py-6 sm:px-8 lg:row-start-1 lg:border-l lg:pt-14">
          <div className="mx-auto max-w-md">
            <h1>{title}</h1>
            {lead && <p className="text-ink-2 mt-1.5">{lead}</p>}
            <div className="mt-5">{children}</div>
          </div>
        </section>
        <TitleCells title={title} />
      </div>
    </main>
  )
}

function Drawing() {
  return (
    <div className="border-ink flex items-center gap-3 px-5 max-lg:border-b max-lg:py-4 sm:px-8 lg:row-start-1">
      <div className="flex items-center gap-3 lg:hidden">
        <Mark palette={pagePalette} width={40} />
        <span aria-hidden className="text-lg font-[750] font-stretch-[118%]">
          Lineside
        </span>
      </div>
      <figure className="mx-auto hidden w-full max-w-4xl lg:block [&_svg]:h-auto [&_svg]:w-full">
        <LineDrawing palette={pagePalette} />
        <figcaption className="cap mt-2">
          An application as Lineside draws it, an example. Shows paperwork, not the state of
          equipment.
        </figcaption>
      </figure>
    </div>
  )
}

function TitleCells({ title }: { title: string }) {
  const cells = [
    { caption: 'Sheet', value: title },
    { caption: 'Access', value: 'By invitation' },
    { caption: 'Session', value: '12 hours' },
  ]
  return (
    <dl className="border-ink grid grid-cols-3 border-t lg:col-span-2 lg:grid-cols-[minmax(0,1fr)_repeat(3,auto)]">
      <div className="col-span-3 hidden items-center gap-4 px-8 py-3.5 lg:col-span-1 lg:flex">
        <dt className="contents">
          <Mark palette={pagePalette} width={46} />
          <span aria-hidden className="text-[1.25rem] font-[750] font-stretch-[118%]">
            Lineside
          </span>
        </dt>
        <dd className="text-ink-2">Interconnection applications, their clocks and paperwork</dd>
      </div>
      {cells.map(({ caption, value }, index) => (
        <div
          key={caption}
          className={`border-ink px-4 py-2.5 lg:min-w-36 lg:border-l ${index > 0 ? 'border-l' : ''}`}
        >
          <dt className="cap">{caption}</dt>
          <dd className="font-semibold">{value}</dd>
        </div>
      ))}
    </dl>
  )
}
