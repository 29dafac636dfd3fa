const maxCharacters = 180
// Control characters must not reach a name.
const unsafe = /[\0-\x1f\x7f-\x9f\u200e\u200f\u202a-\u202e\u2066-\u2069"*:<>?|]/g

/** A name as it may be kept and saved under: no folders, no control or direction characters. */
export function safeFileName(name: string): string {
  const last = name.split(/[\\/]/).pop() ?? ''
  const clean = last
    .normalize('NFC')
    .replace(unsafe, '')
    .replace(/\p{Cs}/gu, '')
    .replace(/^[.\s]+|[.\s]+$/g, '')
  const characters = [...clean]
  if (characters.length <= maxCharacters) return clean || 'file'
  const ending = /\.[^.]{1,10}$/.exec(clean)?.[0] ?? ''
  return characters.slice(0, maxCharacters - ending.length).join('') + ending
}

/**
 * Content-Disposition of a download with any name: an ASCII stand-in and the real one.
 * Source: RFC 6266 section 4.3, extended value by RFC 8187 (successor of RFC 5987).
 */
export function attachmentDisposition(name: string): string {
  const safe = safeFileName(name)
  const ascii = safe
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\x20-\x7e]/g, '_')
    .replace(/["\\%]/g, '_')
  const extended = encodeURIComponent(safe).replace(
    /['()*!]/g,
    (character) => `%${character.charCodeAt(0).toString(16).toUpperCase()}`,
  )
  return `attachment; filename="${ascii}"; filename*=UTF-8''${extended}`
}

/** Headers under which kept bytes go out: saved, never run. */
export function downloadHeaders(file: { name: string; type: string; size: number }): HeadersInit {
  return {
    'content-type': file.type === 'text/plain' ? 'text/plain; charset=utf-8' : file.type,
    'content-length': String(file.size),
    'content-disposition': attachmentDisposition(file.name),
    'content-security-policy': "sandbox; default-src 'none'",
    'x-content-type-options': 'nosniff',
    'cache-control': 'private, no-store',
  }
}
