import { Paragraph, type Table } from 'docx'
import { boxCell, boxOf } from '@/templates/exhibits/_parts/table'
import { contentWidth, sheet } from '@/templates/exhibits/_parts/theme'

interface TitleBlock {
  letter: string
  title: string
  project: string
  requestNo: string
  /** Number and date: `2 · 30 Nov 2026`. */
  revision: string
}

const widths = [3600, 2120, 2060, contentWidth - 3600 - 2120 - 2060]

/** The ruled box that an exhibit opens with. */
export function titleBlock({ letter, title, project, requestNo, revision }: TitleBlock): Table {
  const cells: [string, string, string][] = [
    [`Exhibit ${letter}`, title, 'ExhibitTitle'],
    ['Project', project, 'CellValue'],
    ['Request', requestNo.replaceAll('-', '\u2011'), 'CellNumber'],
    ['Revision', revision, 'CellValue'],
  ]
  return boxOf(
    cells.map(([caption, value, style], i) =>
      boxCell(
        widths[i]!,
        [
          new Paragraph({ style: 'CellCaption', text: caption }),
          new Paragraph({ style, text: value, spacing: { before: 30 } }),
        ],
        sheet,
      ),
    ),
    widths,
  )
}
