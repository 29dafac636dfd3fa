import { clsx } from 'clsx'
import Link from 'next/link'
import type { ReactNode } from 'react'
import { RowOpener } from '@/components/ui/row-opener'

export interface Column<Row> {
  key: string
  header: ReactNode
  cell: (row: Row) => ReactNode
  /** Numbers stand right. */
  align?: 'start' | 'end'
  mono?: boolean
  /** The name this column is sorted by in the address bar; without one it cannot be sorted. */
  sortBy?: string
  /**
   * On a phone: `lead` heads the row, `aside` stands at its right, `line` is a captioned line,
   * `bare` a line without caption, `hide` is left out. The first column leads unless told.
   */
  phone?: 'lead' | 'aside' | 'line' | 'bare' | 'hide'
  className?: string
}

export interface Sort {
  by: string
  order: 'asc' | 'desc'
}

export interface DataTableProps<Row> {
  /** What the table holds, for those who do not see it. */
  caption: string
  columns: readonly Column<Row>[]
  rows: readonly Row[]
  rowKey: (row: Row) => string
  /** Where a row leads; the first cell holds the link. */
  rowHref?: (row: Row) => string | undefined
  sort?: Sort
  /** The address of the same page in another order. */
  sortHref?: (sort: Sort) => string
  /** Stands in place of the rows when there are none. */
  empty?: ReactNode
}

/** The order a header's link leads to: its own first ascending, then turned. */
export function nextSort(current: Sort | undefined, by: string): Sort {
  return { by, order: current?.by === by && current.order === 'asc' ? 'desc' : 'asc' }
}

/** A ruled table: header in sight, rows that open, lines stacked on a phone. Explicit roles keep its meaning there. */
export function DataTable<Row>(props: DataTableProps<Row>) {
  const { caption, columns, rows, rowKey, empty } = props
  if (rows.length === 0 && empty) return <>{empty}</>
  return (
    <div className="max-lg:overflow-x-auto">
      <table role="table" className="w-full border-separate border-spacing-0 max-sm:block">
        <caption className="sr-only">{caption}</caption>
        <thead role="rowgroup" className="max-sm:sr-only">
          <tr role="row">
            {columns.map((column) => (
              <HeaderCell key={column.key} column={column} table={props} />
            ))}
          </tr>
        </thead>
        <RowOpener>
          {rows.map((row) => (
            <TableRow key={rowKey(row)} row={row} table={props} />
          ))}
        </RowOpener>
      </table>
    </div>
  )
}

function HeaderCell<Row>({ column, table }: { column: Column<Row>; table: DataTableProps<Row> }) {
  const { sort, sortHref } = table
  const isSorted = column.sortBy !== undefined && sort?.by === column.sortBy
  const order = isSorted ? (sort.order === 'asc' ? 'ascending' : 'descending') : undefined
  return (
    <th
      role="columnheader"
      scope="col"
      aria-sort={order}
      className={clsx(
        'border-ink bg-film text-th text-ink-2 sticky top-0 z-[1] border-b-[1.5px] py-2 pr-4 font-medium font-stretch-[86%] last:pr-0',
        column.align === 'end' ? 'text-right' : 'text-left',
        column.className,
      )}
    >
      {column.sortBy && sortHref ? (
        <Link
          href={sortHref(nextSort(sort, column.sortBy))}
          scroll={false}
          className={clsx('no-underline hover:underline', isSorted && 'text-ink')}
        >
          {column.header}
          {isSorted && <span aria-hidden> {sort.order === 'asc' ? '↑' : '↓'}</span>}
        </Link>
      ) : (
        column.header
      )}
    </th>
  )
}

function TableRow<Row>({ row, table }: { row: Row; table: DataTableProps<Row> }) {
  const href = table.rowHref?.(row)
  return (
    <tr
      role="row"
      className={clsx(
        'border-rule max-sm:grid max-sm:grid-cols-[minmax(0,1fr)_auto] max-sm:gap-x-4 max-sm:gap-y-1 max-sm:border-b max-sm:py-3',
        href && 'hover:bg-sheet has-[a[data-row-link]]:cursor-pointer',
      )}
    >
      {table.columns.map((column, index) => (
        <Cell key={column.key} column={column} row={row} index={index} href={href} />
      ))}
    </tr>
  )
}

interface CellProps<Row> {
  column: Column<Row>
  row: Row
  index: number
  href?: string
}

function Cell<Row>({ column, row, index, href }: CellProps<Row>) {
  const phone = column.phone ?? (index === 0 ? 'lead' : 'line')
  const content = column.cell(row)
  return (
    <td
      role="cell"
      className={clsx(
        'border-rule border-b py-2.5 pr-4 align-middle last:pr-0 max-sm:border-0 max-sm:py-0 max-sm:pr-0',
        column.align === 'end' && 'sm:text-right',
        column.mono && 'mono',
        phoneClass[phone],
        column.className,
      )}
    >
      {phone === 'line' && <span className="cap font-sans sm:hidden">{column.header}</span>}
      {index === 0 && href ? (
        <Link data-row-link href={href} className="no-underline">
          {content}
        </Link>
      ) : (
        content
      )}
    </td>
  )
}

const phoneClass = {
  lead: 'max-sm:col-start-1',
  aside: 'max-sm:col-start-2 max-sm:row-start-1 max-sm:justify-self-end max-sm:text-right',
  line: 'max-sm:col-span-2 max-sm:flex max-sm:items-baseline max-sm:justify-between max-sm:gap-4',
  bare: 'max-sm:col-span-2',
  hide: 'max-sm:hidden',
} as const
