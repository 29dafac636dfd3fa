import { Readable } from 'node:stream'
import type { ReadableStream as NodeStream } from 'node:stream/web'
import { eq } from 'drizzle-orm'
import { simpleParser, type AddressObject, type ParsedMail } from 'mailparser'
import { entries } from '@/db/schema/correspondence'
import { people } from '@/db/schema/people'
import { localOf } from '@/lib/domain/clocks/zoned'
import { safeFileName } from '@/lib/files/file-name'
import { getFileStore } from '@/lib/files/store'
import type { EmlDraft, EmlInput } from '@/lib/schemas/entry'
import type { UploadedFile } from '@/lib/schemas/file'
import { authorize, type Context } from '@/lib/services/context'
import { invalid, notFound, ServiceError } from '@/lib/services/errors'
import { findAttachable, keepFile } from '@/lib/services/files'

const maxTextCharacters = 100_000
const maxParts = 49

/**
 * Reads an uploaded e-mail file (RFC 5322) into the fields of an entry; the files inside it are
 * kept too, so that they can be attached. Nothing is recorded yet.
 * @throws ServiceError `not_found`, `invalid` where the file is no e-mail.
 */
export async function readEml(ctx: Context, input: EmlInput): Promise<EmlDraft> {
  authorize(ctx, 'entry.record')
  const attachable = await findAttachable(ctx, ctx.db, [input.sha256])
  if (!attachable.has(input.sha256)) throw notFound('file')
  const opened = await getFileStore().open(input.sha256)
  if (!opened)
    throw new ServiceError('unavailable', 'The file is recorded, but the store does not hold it.')
  const mail = await simpleParser(Readable.fromWeb(opened.stream as NodeStream))
  if (!mail.from && !mail.date && !mail.messageId)
    throw invalid([{ path: 'sha256', message: `"${input.name}" holds no e-mail.` }])
  const { size } = opened
  const whole = { sha256: input.sha256, size, type: 'message/rfc822', name: input.name }
  return {
    ...momentOf(mail, input.zone),
    ...(await sidesOf(ctx, mail)),
    subject: (mail.subject ?? '').slice(0, 300),
    text: (mail.text ?? '').trim().slice(0, maxTextCharacters),
    messageId: mail.messageId?.slice(0, 500) ?? null,
    attachments: [whole, ...(await keepParts(ctx, mail))],
    recordedAs: await recordedAs(ctx, mail.messageId),
  }
}

function momentOf(mail: ParsedMail, zone: string): { on: string | null; time: string | null } {
  if (!mail.date || Number.isNaN(mail.date.getTime())) return { on: null, time: null }
  try {
    const local = localOf(mail.date.toISOString(), zone)
    return { on: local.on, time: local.time.slice(0, 5) }
  } catch {
    throw invalid([{ path: 'zone', message: `"${zone}" is no zone such as America/Denver.` }])
  }
}

/** Out where one of our people sent it; the other side stands in `parties`. */
async function sidesOf(
  ctx: Context,
  mail: ParsedMail,
): Promise<{ direction: 'in' | 'out'; parties: string }> {
  const from = mail.from?.value[0]?.address?.toLowerCase()
  const ours = from ? await ctx.db.select().from(people).where(eq(people.email, from)) : []
  const isOut = ours.length > 0
  const others = isOut ? mail.to : mail.from
  return { direction: isOut ? 'out' : 'in', parties: namesOf(others).slice(0, 300) }
}

function namesOf(addresses: AddressObject | AddressObject[] | undefined): string {
  const list = addresses === undefined ? [] : [addresses].flat()
  return list
    .flatMap((one) => one.value)
    .map(({ name, address }) => (name && address ? `${name} <${address}>` : name || address || ''))
    .filter(Boolean)
    .join(', ')
}

async function keepParts(ctx: Context, mail: ParsedMail): Promise<UploadedFile[]> {
  const kept: UploadedFile[] = []
  // Pictures that the text only decorates itself with are in the e-mail file already.
  const parts = mail.attachments.filter((part) => !part.related && part.content.byteLength > 0)
  for (const [index, part] of parts.slice(0, maxParts).entries()) {
    const name = safeFileName(part.filename ?? `attachment ${index + 1}`)
    kept.push(await keepFile(ctx, part.content, name))
  }
  return kept
}

async function recordedAs(ctx: Context, messageId: string | undefined): Promise<string | null> {
  if (!messageId) return null
  const rows = await ctx.db
    .select({ id: entries.id })
    .from(entries)
    .where(eq(entries.messageId, messageId.slice(0, 500)))
  return rows[0]?.id ?? null
}
