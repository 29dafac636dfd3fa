import {
  BorderStyle,
  Paragraph,
  Table,
  TableCell,
  TableLayoutType,
  TableRow,
  TextRun,
  WidthType,
  type IBorderOptions,
  type ITableCellOptions,
} from 'docx'
import { bindUnits } from '@/components/drawing/text'
import { contentWidth, copper, ink, rule } from '@/templates/exhibits/_parts/theme'

const none: IBorderOptions = { style: BorderStyle.NONE, size: 0, color: 'auto' }
export const noBorders = { top: none, bottom: none, left: none, right: none }
export const noTableBorders = { ...noBorders, insideHorizontal: none, insideVertical: none }
export const thin: IBorderOptions = { style: BorderStyle.SINGLE, size: 4, color: rule }
export const heavy: IBorderOptions = { style: BorderStyle.SINGLE, size: 8, color: ink }

/** Width of the bar of change that hangs left of a row, and its distance from the text; twips. */
const bar = { width: 44, off: 60 }

export interface Column {
  /** Twips; those of a table add up to `contentWidth`. */
  width: number
  /** Id of a named paragraph style. */
  style: string
  align?: 'left' | 'right'
}

export interface RuledRow {
  cells: readonly string[]
  /** A bar of change at the left. */
  changed?: boolean
  bold?: boolean
}

interface RuledTable {
  columns: readonly Column[]
  rows: readonly RuledRow[]
  head?: readonly string[]
  /** Keeps the whole table on one page; long tables break between rows instead. */
  together?: boolean
  /** Text before each row's rule, twips above and below. */
  air?: number
}

/** No margins of the table's own: older layouts of Word hang a table out by them. */
export const noMargins = { top: 0, bottom: 0, left: 0, right: 0, marginUnitType: WidthType.DXA }

/** A table of ruled lines: a head that repeats on the next page, rows that never split. */
export function ruledTable({ columns, rows, head, together = true, air = 56 }: RuledTable): Table {
  const last = rows.length - 1
  const stays = (i: number) => (together ? i < last : i === 0 || i === last - 1)
  const hang = bar.width + bar.off
  return new Table({
    width: { size: contentWidth + hang, type: WidthType.DXA },
    indent: { size: -hang, type: WidthType.DXA },
    layout: TableLayoutType.FIXED,
    columnWidths: [bar.width, ...columns.map(widthOf)],
    borders: noTableBorders,
    margins: noMargins,
    rows: [
      ...(head ? [headRow(head, columns)] : []),
      ...rows.map((row, i) => ruledRow(row, columns, stays(i), air)),
    ],
  })
}

const widthOf = (column: Column, index: number) => column.width + (index === 0 ? bar.off : 0)

function headRow(head: readonly string[], columns: readonly Column[]): TableRow {
  const look = { keepNext: true, bottom: heavy, air: 40 }
  const cells = head.map((text, i) => cellOf(text, { ...columns[i]!, style: 'TableHead' }, i, look))
  return new TableRow({ children: [barCell(false), ...cells], tableHeader: true, cantSplit: true })
}

function ruledRow(
  { cells, changed, bold }: RuledRow,
  columns: readonly Column[],
  keepNext: boolean,
  air: number,
): TableRow {
  const look = { keepNext, bottom: thin, bold, air }
  const ruled = cells.map((text, i) => cellOf(text, columns[i]!, i, look))
  return new TableRow({ children: [barCell(changed ?? false), ...ruled], cantSplit: true })
}

/** A cell of its own rather than a border: programs place a table by the borders of its cells. */
function barCell(changed: boolean): TableCell {
  return new TableCell({
    width: { size: bar.width, type: WidthType.DXA },
    borders: noBorders,
    ...(changed && { shading: { type: 'clear', fill: copper, color: 'auto' } }),
    children: [new Paragraph({ style: 'RowNote' })],
  })
}

interface CellLook {
  keepNext: boolean
  bottom: IBorderOptions
  bold?: boolean
  air: number
}

function cellOf(text: string, column: Column, index: number, look: CellLook): TableCell {
  const { keepNext, bottom, bold, air } = look
  return new TableCell({
    width: { size: widthOf(column, index), type: WidthType.DXA },
    borders: { ...noBorders, bottom },
    margins: {
      top: air,
      bottom: air,
      left: index === 0 ? bar.off : 70,
      right: 40,
      marginUnitType: WidthType.DXA,
    },
    verticalAlign: bottom === heavy ? 'bottom' : 'top',
    children: [
      new Paragraph({
        style: column.style,
        alignment: column.align ?? 'left',
        keepNext,
        children: [new TextRun({ text: bindUnits(text), ...(bold && { bold }) })],
      }),
    ],
  })
}

/** A cell of a drawn box: caption above value. */
export function boxCell(
  width: number,
  children: ITableCellOptions['children'],
  shade: string,
): TableCell {
  return new TableCell({
    width: { size: width, type: WidthType.DXA },
    borders: { top: heavy, bottom: heavy, left: heavy, right: heavy },
    shading: { type: 'clear', fill: shade, color: 'auto' },
    margins: { top: 110, bottom: 130, left: 160, right: 100, marginUnitType: WidthType.DXA },
    children,
  })
}

/** A box of cells side by side, as wide as the text. */
export function boxOf(
  cells: readonly TableCell[],
  widths: readonly number[],
  height?: number,
): Table {
  const atLeast = height ? { height: { value: height, rule: 'atLeast' as const } } : {}
  return new Table({
    width: { size: contentWidth, type: WidthType.DXA },
    layout: TableLayoutType.FIXED,
    columnWidths: widths,
    margins: noMargins,
    rows: [new TableRow({ children: cells, cantSplit: true, ...atLeast })],
  })
}
