import {
  HeadingLevel,
  Paragraph,
  Table,
  TableCell,
  TableLayoutType,
  TableRow,
  TextRun,
  WidthType,
  type FileChild,
  type IPropertiesOptions,
} from 'docx'
import { caution } from '@/templates/exhibits/_parts/caution'
import { footers, headers } from '@/templates/exhibits/_parts/page-lines'
import { pictureCaption, pictureLine, type Picture } from '@/templates/exhibits/_parts/picture'
import { signatureBlock } from '@/templates/exhibits/_parts/signature-block'
import {
  noBorders,
  noMargins,
  noTableBorders,
  ruledTable,
  type Column,
} from '@/templates/exhibits/_parts/table'
import { contentWidth, page, styles } from '@/templates/exhibits/_parts/theme'
import { titleBlock } from '@/templates/exhibits/_parts/title-block'
import type { ContentRow, ExhibitCContent } from '@/templates/exhibits/exhibit-c-content'

export interface ExhibitCPictures {
  oneLine: Picture
  clipping: Picture
  duration: Picture
  hours: Picture
}

/** Exhibit C as a Word document: tables, styles and fields of Word's own. */
export function exhibitC(content: ExhibitCContent, pictures: ExhibitCPictures): IPropertiesOptions {
  const lines = { letter: 'C', ...content }
  return {
    title: `Exhibit C, revision ${content.revisionNo}: ${content.title}`,
    subject: `${content.project}, request ${content.requestNo}`,
    creator: content.prepared,
    lastModifiedBy: content.prepared,
    description: content.inputs,
    styles,
    compatabilityModeVersion: 15,
    sections: [
      {
        properties: {
          titlePage: true,
          page: {
            size: { width: page.width, height: page.height },
            margin: { ...marginsOf(), header: 520, footer: 560 },
          },
        },
        headers: headers(lines),
        footers: footers(lines),
        children: bodyOf(content, pictures),
      },
    ],
  }
}

const marginsOf = () => ({
  top: page.top,
  bottom: page.bottom,
  left: page.left,
  right: page.right,
})

function bodyOf(content: ExhibitCContent, pictures: ExhibitCPictures): FileChild[] {
  return [
    titleBlock({ letter: 'C', ...content }),
    ...plantSection(content, pictures),
    ...resultSection(content, pictures),
    heading('3. Methods and sources'),
    ruledTable({
      columns: methodColumns,
      rows: threeCells(content.methods),
      together: false,
      air: 44,
    }),
    new Paragraph({ style: 'PictureCaption', text: content.calculation }),
    heading('4. Limits of the estimate'),
    ...content.limits.map(
      ({ lead, text }) =>
        new Paragraph({
          style: 'BodyText',
          children: [new TextRun({ text: `${lead} `, bold: true }), new TextRun(text)],
        }),
    ),
    heading('Revisions'),
    ...revisionTable(content),
    gap(200),
    caution(content.caution),
    gap(200),
    signatureBlock(content),
  ]
}

function plantSection({ elements }: ExhibitCContent, pictures: ExhibitCPictures): FileChild[] {
  return [
    heading('1. Plant as modelled'),
    pictureLine(pictures.oneLine, 1),
    pictureCaption(
      'Figure 1. One-line diagram, simplified: protection, metering and disconnects are left out. Not for construction.',
    ),
    ruledTable({ columns: rowColumns, rows: threeCells(elements) }),
  ]
}

function resultSection(content: ExhibitCContent, pictures: ExhibitCPictures): FileChild[] {
  return [
    heading('2. Result'),
    ruledTable({ columns: rowColumns, rows: threeCells(content.result) }),
    gap(120),
    sideBySide(
      [
        pictureLine(pictures.clipping, 2),
        pictureCaption('Figure 2. Share of a year’s energy clipped, by array over export limit.'),
      ],
      [
        pictureLine(pictures.duration, 3),
        pictureCaption('Figure 3. Hours of the year at or above each output at the POI.'),
      ],
    ),
    heading('Month by month', HeadingLevel.HEADING_2),
    monthlyTable(content),
    gap(160),
    pictureLine(pictures.hours, 4),
    pictureCaption('Figure 4. Energy clipped by hour of the day and month.'),
  ]
}

const rowColumns: Column[] = [
  { width: 3250, style: 'RowLabel' },
  { width: 2300, style: 'RowFigure', align: 'right' },
  { width: contentWidth - 5550, style: 'RowNote' },
]

const methodColumns: Column[] = [
  { width: 3060, style: 'RowLabel' },
  { width: 3500, style: 'RowNote' },
  { width: contentWidth - 6560, style: 'RowNote' },
]

function threeCells(rows: readonly ContentRow[]) {
  return rows.map(({ label, value, note, changed }) => ({ cells: [label, value, note], changed }))
}

function monthlyTable({ monthly }: ExhibitCContent): Table {
  const first = 900
  const others = Math.floor((contentWidth - first) / (monthly.head.length - 1))
  const columns: Column[] = monthly.head.map((_, i) => ({
    width: i === 0 ? contentWidth - others * (monthly.head.length - 1) : others,
    style: i === 0 ? 'RowNote' : 'RowFigure',
    align: i === 0 ? 'left' : 'right',
  }))
  const rows = [...monthly.rows.map((cells) => ({ cells })), { cells: monthly.total, bold: true }]
  return ruledTable({ columns, head: monthly.head, rows, air: 26 })
}

const revisionColumns: Column[] = [
  { width: 560, style: 'RowFigure' },
  { width: 1360, style: 'RowNote' },
  { width: 2050, style: 'RowNote' },
  { width: 2050, style: 'RowNote' },
  { width: contentWidth - 6020, style: 'RowNote' },
]

function revisionTable({ revisions, marks }: ExhibitCContent): FileChild[] {
  const table = ruledTable({
    columns: revisionColumns,
    head: ['No.', 'Date', 'Prepared', 'Checked', 'What is new'],
    rows: revisions.map((row) => ({
      cells: [row.no, row.on, row.prepared, row.checked, row.what],
    })),
    air: 44,
  })
  return marks ? [table, new Paragraph({ style: 'PictureCaption', text: marks })] : [table]
}

function sideBySide(left: Paragraph[], right: Paragraph[]): Table {
  const half = contentWidth / 2
  const cell = (children: Paragraph[], inner: 'left' | 'right') =>
    new TableCell({
      width: { size: half, type: WidthType.DXA },
      borders: noBorders,
      margins: {
        top: 0,
        bottom: 0,
        left: inner === 'left' ? 120 : 0,
        right: inner === 'right' ? 120 : 0,
        marginUnitType: WidthType.DXA,
      },
      children,
    })
  return new Table({
    width: { size: contentWidth, type: WidthType.DXA },
    layout: TableLayoutType.FIXED,
    columnWidths: [half, half],
    borders: noTableBorders,
    margins: noMargins,
    rows: [new TableRow({ cantSplit: true, children: [cell(left, 'right'), cell(right, 'left')] })],
  })
}

function heading(
  text: string,
  level: (typeof HeadingLevel)['HEADING_1' | 'HEADING_2'] = HeadingLevel.HEADING_1,
): Paragraph {
  return new Paragraph({ heading: level, text })
}

/** Air before what follows; two tables need a paragraph between them, or Word joins them. */
function gap(before: number): Paragraph {
  return new Paragraph({ spacing: { before, after: 0, line: 20 }, keepNext: true })
}
