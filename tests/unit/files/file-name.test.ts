import { describe, expect, it } from 'vitest'
import { attachmentDisposition, downloadHeaders, safeFileName } from '@/lib/files/file-name'

describe('a file name as it is kept', () => {
  it.each([
    ['folders are dropped', '../../etc/passwd', 'passwd'],
    ['folders of another system are dropped', 'C:\\letters\\reply.pdf', 'reply.pdf'],
    ['letters of any script stay', 'Prüfbericht 変電所.pdf', 'Prüfbericht 変電所.pdf'],
    ['line breaks and quotes go', 'a"\r\nb.pdf', 'ab.pdf'],
    ['marks that turn the reading direction go', 'invoice\u202efdp.exe', 'invoicefdp.exe'],
    ['leading dots go', '...hidden', 'hidden'],
    ['a name of nothing becomes a word', '..', 'file'],
  ])('%s', (_title, given, expected) => {
    expect(safeFileName(given)).toBe(expected)
  })

  it('a long name is cut and keeps its ending', () => {
    const name = safeFileName(`${'é'.repeat(400)}.pdf`)
    expect([...name]).toHaveLength(180)
    expect(name.endsWith('é.pdf')).toBe(true)
  })
})

describe('a download', () => {
  it('names a file outside ASCII twice: a stand-in, and itself in UTF-8', () => {
    expect(attachmentDisposition("Müller's 図 (1).pdf")).toBe(
      'attachment; filename="Muller\'s _ (1).pdf"; ' +
        "filename*=UTF-8''M%C3%BCller%27s%20%E5%9B%B3%20%281%29.pdf",
    )
  })

  it('is saved, never run: attachment, sandbox, no sniffing', () => {
    const headers = new Headers(
      downloadHeaders({ name: 'a.html', type: 'application/octet-stream', size: 12 }),
    )
    expect(headers.get('content-disposition')).toMatch(/^attachment; /)
    expect(headers.get('content-security-policy')).toMatch(/^sandbox/)
    expect(headers.get('x-content-type-options')).toBe('nosniff')
    expect(headers.get('content-length')).toBe('12')
  })
})
