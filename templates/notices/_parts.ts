/** What an e-mail is made of: one subject, the same content as HTML and as plain text. */
export interface Letter {
  subject: string
  html: string
  text: string
}

/** One paragraph, a link drawn as a button or plain, a ruled box of captions above values, or small print. */
export type LetterPart =
  | { kind: 'paragraph'; text: string }
  | { kind: 'link'; label: string; href: string; look?: 'button' | 'plain' }
  | { kind: 'block'; cells: readonly { caption: string; value: string }[] }
  | { kind: 'note'; text: string }

const ink = '#15242c'
const ink2 = '#4a5a62'
const copper = '#b2501b'
const film = '#f3f5f2'
const sheet = '#fbfcfa'
const rule = '#cfd6d3'
const face = 'font-family: Archivo, Arial, Helvetica, sans-serif'

/** Text as it may stand in HTML, attributes included. */
export function escapeHtml(text: string): string {
  const entities: Record<string, string> = {
    '&': '&amp;',
    '<': '&lt;',
    '>': '&gt;',
    '"': '&quot;',
    "'": '&#39;',
  }
  return text.replace(/[&<>"']/g, (sign) => entities[sign] ?? sign)
}

/**
 * Sets an e-mail in the product's hand: tables and inline styles only, because mail programs drop
 * everything else. The plain text carries every word and every address of the HTML.
 */
export function letter(subject: string, parts: readonly LetterPart[]): Letter {
  return { subject, html: page(subject, parts.map(htmlOf).join('')), text: textOf(subject, parts) }
}

function page(subject: string, content: string): string {
  return `<!doctype html>
<html lang="en-US">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${escapeHtml(subject)}</title></head>
<body style="margin: 0; padding: 0; background: ${film}; color: ${ink}; ${face};">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="background: ${film};"><tr><td align="center" style="padding: 28px 16px;">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="max-width: 560px; background: ${sheet}; border: 1px solid ${ink};">
<tr><td style="padding: 14px 22px; border-bottom: 1px solid ${ink}; ${face}; font-size: 16px; font-weight: 700;">Lineside</td></tr>
<tr><td style="padding: 22px 22px 10px; ${face};"><h1 style="margin: 0 0 16px; font-size: 21px; line-height: 1.25;">${escapeHtml(subject)}</h1>${content}</td></tr>
</table>
</td></tr></table>
</body>
</html>`
}

function htmlOf(part: LetterPart): string {
  switch (part.kind) {
    case 'paragraph':
      return `<p style="margin: 0 0 14px; font-size: 15px; line-height: 1.5;">${escapeHtml(part.text)}</p>`
    case 'link':
      return part.look === 'plain'
        ? plainLinkHtml(escapeHtml(part.label), escapeHtml(part.href))
        : linkHtml(escapeHtml(part.label), escapeHtml(part.href))
    case 'block':
      return blockHtml(part.cells)
    case 'note':
      return `<p style="margin: 0 0 14px; font-size: 13px; line-height: 1.5; color: ${ink2};">${escapeHtml(part.text)}</p>`
  }
}

function linkHtml(label: string, href: string): string {
  return `<table role="presentation" cellpadding="0" cellspacing="0" style="margin: 4px 0 18px;"><tr><td style="background: ${copper}; border-radius: 3px;"><a href="${href}" style="display: inline-block; padding: 11px 18px; ${face}; font-size: 15px; font-weight: 600; color: #ffffff; text-decoration: none;">${label}</a></td></tr></table>`
}

function plainLinkHtml(label: string, href: string): string {
  return `<p style="margin: 0 0 14px; font-size: 15px; line-height: 1.5;"><a href="${href}" style="color: ${ink}; ${face};">${label}</a></p>`
}

function blockHtml(cells: readonly { caption: string; value: string }[]): string {
  const rows = cells.map(
    ({ caption, value }) =>
      `<tr><td style="padding: 7px 12px; border-bottom: 1px solid ${rule}; font-size: 13px; white-space: nowrap; color: ${ink2}; ${face};">${escapeHtml(caption)}</td><td style="padding: 7px 12px; border-bottom: 1px solid ${rule}; font-size: 15px; font-weight: 600; ${face};">${escapeHtml(value)}</td></tr>`,
  )
  return `<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="margin: 0 0 18px; border: 1px solid ${ink}; border-bottom: 0;">${rows.join('')}</table>`
}

function textOf(subject: string, parts: readonly LetterPart[]): string {
  const lines = parts.map((part) => {
    if (part.kind === 'link') return `${part.label}:\n${part.href}`
    if (part.kind !== 'block') return part.text
    return part.cells.map(({ caption, value }) => `${caption}: ${value}`).join('\n')
  })
  return [subject, ...lines].join('\n\n') + '\n'
}
