import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import JSZip from 'jszip'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { typeOfFile } from '@/lib/files/content-type'

let folder: string
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'lineside-types-'))
})
afterAll(() => rm(folder, { recursive: true, force: true }))

async function typeOf(name: string, bytes: Uint8Array | string): Promise<string> {
  const place = path.join(folder, name)
  await writeFile(place, bytes)
  return typeOfFile(place)
}

// A picture of one pixel: PNG signature and header chunk (W3C PNG specification, sections 5.2, 11.2.2).
const png = Buffer.from(
  '89504e470d0a1a0a0000000d4948445200000001000000010806000000' +
    '1f15c4890000000a49444154789c63000100000500010d0a2db40000000049454e44ae426082',
  'hex',
)
const octets = 'application/octet-stream'

describe('a type is read from the content, never from the name', () => {
  it.each<[string, string, Uint8Array | string, string]>([
    ['a picture named as a list', 'list.csv', png, 'image/png'],
    ['a PDF named as a picture', 'plan.png', '%PDF-1.7\n%\u00e2\u00e3\n1 0 obj', 'application/pdf'],
    ['a list', 'list.csv', 'Request,MW\nAVE-26C-014,48\n', 'text/plain'],
    ['text outside ASCII', 'note.txt', 'Überprüfung 変電所', 'text/plain'],
    ['a page of HTML named as a list', 'list.csv', '<!DOCTYPE html><html></html>', octets],
    ['a page of HTML after blank lines', 'a.txt', '\n\n  <HTML><body>x</body>', octets],
    ['a script inside text', 'a.txt', 'Dear all\n<script>alert(1)</script>', octets],
    ['an SVG drawing', 'a.svg', '<svg xmlns="http://www.w3.org/2000/svg"/>', octets],
    ['an SVG after an XML line', 'a.svg', '<?xml version="1.0"?><svg/>', octets],
    ['bytes without meaning', 'a.txt', new Uint8Array([1, 2, 3, 0, 255]), octets],
    ['text in another encoding', 'a.txt', Buffer.from('caf\xe9', 'latin1'), octets],
    [
      'a zip signature and nothing more',
      'a.docx',
      Buffer.from('504b0304', 'hex'),
      'application/zip',
    ],
  ])('%s', async (_title, name, bytes, expected) => {
    expect(await typeOf(name, bytes)).toBe(expected)
  })

  it('a document packed as zip is that document', async () => {
    const zip = new JSZip()
    zip.file('[Content_Types].xml', contentTypes)
    zip.file('word/document.xml', '<w:document/>')
    expect(await typeOf('a.bin', await zip.generateAsync({ type: 'nodebuffer' }))).toBe(
      'application/vnd.openxmlformats-officedocument.wordprocessingml.document',
    )
  })

  it('a character cut at the end of the sample does not make text into bytes', async () => {
    const text = `${'a'.repeat(64 * 1024 - 1)}é and more`
    expect(await typeOf('long.txt', text)).toBe('text/plain')
  })
})

const contentTypes =
  '<?xml version="1.0"?><Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">' +
  '<Override PartName="/word/document.xml" ContentType="application/' +
  'vnd.openxmlformats-officedocument.wordprocessingml.document.main+xml"/></Types>'
