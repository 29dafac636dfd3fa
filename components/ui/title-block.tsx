import { clsx } from 'clsx'
import type { ReactNode } from 'react'

export interface TitleCell {
  caption: string
  value: ReactNode
  /** Share of the width against the other cells; 1 unless told. */
  grow?: number
  /** Request numbers and the like. */
  mono?: boolean
  /** What the page is about: its cell is the page's heading. Only one per page. */
  heading?: boolean
  /** A second line under the value. */
  note?: ReactNode
}

/** The ruled box of a drawing: caption above value, cell by cell; two columns on a phone. */
export function TitleBlock({ cells, label }: { cells: readonly TitleCell[]; label?: string }) {
  const isOdd = cells.filter((cell) => !cell.heading).length % 2 === 1
  return (
    <dl
      aria-label={label}
      className="border-ink bg-sheet grid grid-cols-2 overflow-hidden border-[1.5px] sm:flex sm:flex-wrap print:mb-4"
    >
      {cells.map((cell, index) => (
        <Cell key={cell.caption} cell={cell} isAlone={isOdd && index === cells.length - 1} />
      ))}
    </dl>
  )
}

/* Each cell draws its right and lower rule one pixel outside itself, so that the frame hides the last. */
/* `isAlone`: the last cell of an odd number, which takes both columns of a phone. */
function Cell({ cell, isAlone }: { cell: TitleCell; isAlone: boolean }) {
  const { caption, value, grow = 1, mono, heading, note } = cell
  return (
    <div
      style={{ flexGrow: grow }}
      className={clsx(
        'border-ink -mr-px -mb-px min-w-0 border-r border-b px-3.5 pt-2.5 pb-3 sm:min-w-28 sm:basis-auto',
        (heading || isAlone) && 'max-sm:col-span-2',
      )}
    >
      <dt className="cap">{caption}</dt>
      <dd
        className={clsx('mt-0.5 font-semibold break-words', mono && 'mono', !heading && 'text-lg')}
      >
        {heading ? <h1 className="text-[1.375rem]">{value}</h1> : value}
      </dd>
      {note && <dd className="cap mt-0.5">{note}</dd>}
    </div>
  )
}
