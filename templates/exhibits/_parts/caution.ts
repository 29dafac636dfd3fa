import {
  BorderStyle,
  Paragraph,
  Table,
  TableCell,
  TableLayoutType,
  TableRow,
  WidthType,
} from 'docx'
import { noBorders, noMargins, noTableBorders } from '@/templates/exhibits/_parts/table'
import { amber, amberGround, contentWidth } from '@/templates/exhibits/_parts/theme'

/** An amber bar for what a reader must keep in mind; kept with what follows. */
export function caution(text: string): Table {
  return new Table({
    width: { size: contentWidth, type: WidthType.DXA },
    layout: TableLayoutType.FIXED,
    columnWidths: [contentWidth],
    borders: noTableBorders,
    margins: noMargins,
    rows: [
      new TableRow({
        cantSplit: true,
        children: [
          new TableCell({
            width: { size: contentWidth, type: WidthType.DXA },
            borders: { ...noBorders, left: { style: BorderStyle.SINGLE, size: 36, color: amber } },
            shading: { type: 'clear', fill: amberGround, color: 'auto' },
            margins: {
              top: 110,
              bottom: 110,
              left: 200,
              right: 160,
              marginUnitType: WidthType.DXA,
            },
            children: [new Paragraph({ style: 'CautionText', text, keepNext: true })],
          }),
        ],
      }),
    ],
  })
}
