import { Paragraph, type Table } from 'docx'
import { boxCell, boxOf } from '@/templates/exhibits/_parts/table'
import { contentWidth, sheet } from '@/templates/exhibits/_parts/theme'

const third = Math.floor(contentWidth / 3)
const widths = [third, third, contentWidth - 2 * third]

/** Who prepared, who checked, and room for a seal. */
export function signatureBlock({
  prepared,
  checked,
}: {
  prepared: string
  checked: string
}): Table {
  const cells = [
    ['Prepared', prepared],
    ['Checked', checked],
    ['Seal, if the utility asks for one', ''],
  ]
  return boxOf(
    cells.map(([caption, value], i) =>
      boxCell(
        widths[i]!,
        [
          new Paragraph({ style: 'CellCaption', text: caption }),
          new Paragraph({ style: 'RowLabel', text: value, spacing: { before: 30 } }),
        ],
        sheet,
      ),
    ),
    widths,
    1000,
  )
}
