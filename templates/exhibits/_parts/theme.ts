import { LineRuleType, type IStylesOptions } from 'docx'

/** Colors, faces and sizes of an exhibit: the drawing set on white paper. */
export const ink = '15242C'
export const ink2 = '4A5A62'
export const rule = 'CFD6D3'
export const copper = 'B2501B'
export const sheet = 'FBFCFA'
export const amber = '8A6100'
export const amberGround = 'F7EBCB'
export const amberInk = '4D3A08'

/** US Letter with its margins, and the width between them; twips. */
export const page = {
  width: 12_240,
  height: 15_840,
  left: 1080,
  right: 1080,
  top: 1000,
  bottom: 1000,
}
export const contentWidth = page.width - page.left - page.right

const sans = 'Archivo'
const mono = { ascii: 'Chivo Mono', hAnsi: 'Chivo Mono', cs: 'Courier New' }

/** What a reader's machine sets where the faces are missing; written into the font table. */
export const fallbacks: Readonly<Record<string, string>> = {
  Archivo: 'Arial',
  'Chivo Mono': 'Courier New',
}

const line = (twips: number) => ({ line: twips, lineRule: LineRuleType.AUTO })
const own = (id: string, name: string) => ({ id, name, basedOn: 'Normal', quickFormat: true })

/** Every paragraph style by name, so that Word's style list is the exhibit's own hand. */
export const styles: IStylesOptions = {
  default: {
    document: {
      run: { font: sans, size: 20, color: ink, language: { value: 'en-US' } },
      paragraph: { spacing: { after: 0, ...line(252) } },
    },
    heading1: {
      run: { font: sans, size: 26, bold: true, color: ink },
      paragraph: { spacing: { before: 260, after: 80 }, keepNext: true, keepLines: true },
    },
    heading2: {
      run: { font: sans, size: 20, bold: true, color: ink },
      paragraph: { spacing: { before: 200, after: 60 }, keepNext: true, keepLines: true },
    },
  },
  paragraphStyles: [
    { ...own('CellCaption', 'Cell caption'), run: { size: 17, color: ink2 } },
    {
      ...own('ExhibitTitle', 'Exhibit title'),
      run: { size: 27, bold: true },
      paragraph: { spacing: line(232) },
    },
    { ...own('CellValue', 'Cell value'), run: { size: 21, bold: true } },
    { ...own('CellNumber', 'Cell number'), run: { size: 20, bold: true, font: mono } },
    { ...own('RowLabel', 'Row label'), run: { size: 19 } },
    { ...own('RowFigure', 'Row figure'), run: { size: 18, font: mono } },
    { ...own('RowNote', 'Row note'), run: { size: 17, color: ink2 } },
    { ...own('TableHead', 'Table head'), run: { size: 16, color: ink2 } },
    {
      ...own('PictureLine', 'Picture'),
      paragraph: { spacing: { before: 60, after: 0, ...line(240) }, keepNext: true },
    },
    {
      ...own('PictureCaption', 'Picture caption'),
      run: { size: 17, color: ink2 },
      paragraph: { spacing: { before: 40, after: 120 } },
    },
    {
      ...own('BodyText', 'Body text'),
      run: { size: 19 },
      paragraph: { spacing: { after: 90, ...line(264) }, keepLines: true },
    },
    { ...own('CautionText', 'Caution'), run: { size: 19, color: amberInk } },
    { ...own('PageLine', 'Page line'), run: { size: 16, color: ink2 } },
    { ...own('DraftMark', 'Draft mark'), run: { size: 17, bold: true, color: amber } },
  ],
}

/** The face of figures inside a line of the other face. */
export const figures = { font: mono }
