import { Footer, Header, PageNumber, Paragraph, Tab, TabStopType, TextRun } from 'docx'
import { amber, contentWidth, figures } from '@/templates/exhibits/_parts/theme'

const tabStops = [
  { type: TabStopType.CENTER, position: contentWidth / 2 },
  { type: TabStopType.RIGHT, position: contentWidth },
]
const right = [{ type: TabStopType.RIGHT, position: contentWidth }]

interface PageLines {
  letter: string
  title: string
  project: string
  requestNo: string
  revisionNo: number
  /** The frozen inputs, shortened. */
  inputs: string
  isDraft: boolean
}

const DRAFT = 'Draft, not checked'

/** First page: the title block speaks; only a draft says what it is. Later pages name the exhibit. */
export function headers(of: PageLines): { first: Header; default: Header } {
  const { letter, title, project, requestNo, isDraft } = of
  const mark = isDraft
    ? [new Paragraph({ style: 'DraftMark', text: DRAFT, alignment: 'right' })]
    : []
  const names = new Paragraph({
    style: 'PageLine',
    tabStops: right,
    children: [
      new TextRun(`${project}, request ${requestNo}`),
      new TextRun({ children: [new Tab(), `Exhibit ${letter}${isDraft ? '  ' : `: ${title}`}`] }),
      ...(isDraft ? [new TextRun({ text: DRAFT, bold: true, color: amber })] : []),
    ],
  })
  return {
    first: new Header({
      children: mark.length > 0 ? mark : [new Paragraph({ style: 'PageLine' })],
    }),
    default: new Header({ children: [names] }),
  }
}

/** Exhibit and revision, the hash of what was calculated, page of pages as fields. */
export function footers(of: PageLines): { first: Footer; default: Footer } {
  const line = () =>
    new Footer({
      children: [
        new Paragraph({
          style: 'PageLine',
          tabStops,
          children: [
            new TextRun(`Exhibit ${of.letter}, revision ${of.revisionNo}`),
            new TextRun({ children: [new Tab(), of.inputs], ...figures, size: 15 }),
            new TextRun({
              children: [new Tab(), 'Page ', PageNumber.CURRENT, ' of ', PageNumber.TOTAL_PAGES],
            }),
          ],
        }),
      ],
    })
  return { first: line(), default: line() }
}
