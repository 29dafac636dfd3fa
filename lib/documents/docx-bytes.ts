import { Document, Packer, type IPropertiesOptions } from 'docx'
import JSZip from 'jszip'

export interface DocxOptions {
  /** Instant written as made and changed, and as the time of every part. */
  at: Date
  /** Face by face what stands in where it is missing. */
  fallbacks: Readonly<Record<string, string>>
}

/**
 * Packs a document so that the same content gives the same bytes on every run: the library writes
 * the clock into core.xml and into the zip, so both are written anew from the given instant.
 */
export async function docxBytes(
  content: IPropertiesOptions,
  { at, fallbacks }: DocxOptions,
): Promise<Uint8Array> {
  const made = await JSZip.loadAsync(await Packer.toBuffer(new Document(content)))
  const packed = new JSZip()
  for (const name of Object.keys(made.files).sort(byPlace)) {
    const part = made.files[name]!
    if (part.dir) continue
    const bytes = await part.async('uint8array')
    packed.file(name, rewritten(name, bytes, at, fallbacks), {
      date: at,
      createFolders: false,
    })
  }
  return packed.generateAsync({
    type: 'uint8array',
    compression: 'DEFLATE',
    compressionOptions: { level: 9 },
    platform: 'DOS',
  })
}

/** The list of content types comes first, as programs that sniff the format expect. */
function byPlace(a: string, b: string): number {
  const first = '[Content_Types].xml'
  if (a === first || b === first) return a === first ? -1 : 1
  return a < b ? -1 : 1
}

function rewritten(
  name: string,
  bytes: Uint8Array,
  at: Date,
  fallbacks: DocxOptions['fallbacks'],
): Uint8Array | string {
  if (name === 'docProps/core.xml') return withDates(textOf(bytes), at)
  if (name === 'word/fontTable.xml') return fontTable(fallbacks)
  return bytes
}

const textOf = (bytes: Uint8Array) => new TextDecoder().decode(bytes)

function withDates(core: string, at: Date): string {
  const instant = `${at.toISOString().slice(0, 19)}Z`
  return core.replace(
    /(<dcterms:(created|modified)[^>]*>)[^<]*(<\/dcterms:\2>)/g,
    (_all, open: string, _name: string, close: string) => `${open}${instant}${close}`,
  )
}

function fontTable(fallbacks: DocxOptions['fallbacks']): string {
  const fonts = Object.entries(fallbacks).map(([name, alternative]) => {
    const pitch = alternative.startsWith('Courier') ? 'fixed' : 'variable'
    const family = pitch === 'fixed' ? 'modern' : 'swiss'
    return `<w:font w:name="${name}"><w:altName w:val="${alternative}"/><w:charset w:val="00"/><w:family w:val="${family}"/><w:pitch w:val="${pitch}"/></w:font>`
  })
  return `<?xml version="1.0" encoding="UTF-8" standalone="yes"?><w:fonts xmlns:w="http://schemas.openxmlformats.org/wordprocessingml/2006/main">${fonts.join('')}</w:fonts>`
}
