import { and, eq, lt, or, sql, type SQL } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import { entries, entryApplications, factEvidence } from '@/db/schema/correspondence'
import { usualVisibility } from '@/lib/domain/correspondence'
import {
  entryFilter,
  type Entry,
  type EntryFilter,
  type EntryInput,
  type EntryPage,
} from '@/lib/schemas/entry'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { checkEntry, type CheckedEntry } from '@/lib/services/entry-checks'
import { concerns, holdsWords, isLatest, readEntries } from '@/lib/services/entry-reading'
import { invalid, notFound, ServiceError, type FieldError } from '@/lib/services/errors'
import { recordFactInside } from '@/lib/services/facts'
import { linkFiles, linkRevisedFiles } from '@/lib/services/files'
import { hashOfInput } from '@/lib/services/input-hash'
import { isUuid } from '@/lib/services/uuid'

/**
 * Records correspondence and, in the same transaction, the events it proves for each application;
 * the entry and its files become their evidence. The same input under the same id is one entry.
 * @throws ServiceError `invalid` (an event's faults under `facts.<n>.…`), `conflict` for the same
 * id with other content, an entry revised already, an e-mail recorded already; nothing is kept.
 */
export async function recordEntry(ctx: Context, input: EntryInput): Promise<Entry> {
  authorize(ctx, 'entry.record')
  if (input.facts.length > 0) authorize(ctx, 'fact.record')
  if (input.attachments.some((one) => one.restrictedTo)) authorize(ctx, 'file.restrict')
  const inputSha256 = hashOfInput(input)
  try {
    await ctx.db.transaction(async (tx) => {
      if (await isRecorded(tx, input.id, inputSha256)) return
      const checked = await checkEntry(ctx, tx, input)
      if (!(await insertEntry(ctx, tx, input, checked, inputSha256))) return
      await linkAll(ctx, tx, input)
      await recordFacts(ctx, tx, input)
    })
  } catch (error) {
    throw conflictOf(error) ?? error
  }
  return getEntry(ctx, input.id)
}

/** Whether this very entry is there. @throws ServiceError `conflict` where the id holds another. */
async function isRecorded(tx: Tx, id: string, inputSha256: string): Promise<boolean> {
  const [known] = await tx
    .select({ inputSha256: entries.inputSha256 })
    .from(entries)
    .where(eq(entries.id, id))
  if (!known) return false
  if (known.inputSha256 === inputSha256) return true
  throw new ServiceError(
    'conflict',
    'This form was recorded before with other content. Open the entry and revise it.',
  )
}

/** False where a second submit of the same form came first. */
async function insertEntry(
  ctx: Context,
  tx: Tx,
  input: EntryInput,
  { at, zone, answersRoot }: CheckedEntry,
  inputSha256: string,
): Promise<boolean> {
  const added = await tx
    .insert(entries)
    .values({
      id: input.id,
      revisesId: input.revisesId,
      at,
      zone,
      channel: input.channel,
      direction: input.direction,
      visibility: input.visibility ?? usualVisibility(input.channel),
      organizationId: input.organizationId,
      parties: input.parties,
      subject: input.subject,
      text: input.text,
      messageId: input.messageId,
      replyOwedBy: input.replyOwedBy,
      replyOwedOn: input.replyOwedOn,
      answersId: answersRoot,
      inputSha256,
      recordedAt: ctx.now,
      recordedBy: actorId(ctx),
    })
    .onConflictDoNothing({ target: entries.id })
    .returning()
  if (!added[0]) return !(await isRecorded(tx, input.id, inputSha256))
  await recordAudit(ctx, tx, {
    action: input.revisesId ? 'entry.revise' : 'entry.record',
    subjectKind: 'entry',
    subjectId: input.id,
    before: input.revisesId ? { revisesId: input.revisesId } : undefined,
    after: added[0],
  })
  return true
}

async function linkAll(ctx: Context, tx: Tx, input: EntryInput): Promise<void> {
  await tx.insert(entryApplications).values(
    input.applications.map((one) => {
      const proven = input.facts.find((f) => f.applicationId === one.applicationId && f.step)
      return {
        entryId: input.id,
        applicationId: one.applicationId,
        step: one.step ?? proven?.step,
        instance: one.instance ?? proven?.instance,
      }
    }),
  )
  const place = { subjectKind: 'entry' as const, subjectId: input.id }
  const links = input.attachments.map((one) => ({ ...place, ...one }))
  if (!input.revisesId) return linkFiles(ctx, tx, links)
  const before = { subjectKind: place.subjectKind, subjectId: input.revisesId, nextId: input.id }
  return linkRevisedFiles(ctx, tx, links, before)
}

/** Every event's faults are gathered before anything is refused. */
async function recordFacts(ctx: Context, tx: Tx, input: EntryInput): Promise<void> {
  const faults: FieldError[] = []
  for (const [index, { applicationId, ...fact }] of input.facts.entries()) {
    try {
      await recordFactInside(ctx, tx, applicationId, fact)
      await tx
        .insert(factEvidence)
        .values(evidenceRows(ctx, input, fact.id))
        .onConflictDoNothing()
    } catch (error) {
      faults.push(...faultsOf(error, `facts.${index}`))
    }
  }
  if (faults.length > 0) throw invalid(faults)
}

function evidenceRows(ctx: Context, input: EntryInput, factId: string) {
  const hashes = new Set(input.attachments.map((one) => one.sha256))
  const row = { factId, recordedAt: ctx.now }
  return [
    { ...row, entryId: input.id, fileSha256: null },
    ...[...hashes].map((fileSha256) => ({ ...row, entryId: null, fileSha256 })),
  ]
}

/** Only refused input is gathered; a lost connection or a conflict ends the work at once. */
function faultsOf(error: unknown, prefix: string): FieldError[] {
  if (!(error instanceof ServiceError) || error.code !== 'invalid') throw error
  if (error.fields.length === 0) return [{ path: prefix, message: error.message }]
  return error.fields.map(({ path, message }) => ({
    path: path ? `${prefix}.${path}` : prefix,
    message,
  }))
}

const conflicts: Record<string, ServiceError> = {
  entries_revisesId_unique: new ServiceError(
    'conflict',
    'Somebody revised this entry in between. Reload it and revise the latest.',
  ),
  entries_messageId_unique: new ServiceError(
    'conflict',
    'This e-mail is recorded already. Find it by its subject.',
  ),
}

function conflictOf(error: unknown): ServiceError | undefined {
  const cause = (error as { cause?: unknown } | null)?.cause
  const { code, constraint } = (cause ?? error ?? {}) as { code?: string; constraint?: string }
  return code === '23505' && constraint ? conflicts[constraint] : undefined
}

/** Latest revisions, newest first; `next` leads to the following page. */
export async function listEntries(ctx: Context, filter: EntryFilter = {}): Promise<EntryPage> {
  authorize(ctx, 'entry.read')
  const { applicationId, organizationId, find, after, limit } = entryFilter.parse(filter)
  const where = and(
    isLatest(),
    applicationId ? concerns(applicationId) : undefined,
    organizationId ? eq(entries.organizationId, organizationId) : undefined,
    find ? holdsWords(find) : undefined,
    after ? isBefore(after) : undefined,
  )
  const items = await readEntries(ctx, where ?? sql`true`, limit + 1)
  const shown = items.slice(0, limit)
  const last = shown.at(-1)
  return items.length > limit && last ? { items: shown, next: `${last.at}_${last.id}` } : { items }
}

function isBefore(cursor: string): SQL | undefined {
  const [at = '', id = ''] = cursor.split('_')
  const moment = new Date(at)
  if (Number.isNaN(moment.getTime()) || !isUuid(id))
    throw invalid([{ path: 'after', message: 'This is no `next` of an earlier answer.' }])
  return or(lt(entries.at, moment), and(eq(entries.at, moment), lt(entries.id, id)))
}

/** One revision of an entry. @throws ServiceError `not_found` */
export async function getEntry(ctx: Context, id: string): Promise<Entry> {
  authorize(ctx, 'entry.read')
  if (!isUuid(id)) throw notFound('entry')
  const [entry] = await readEntries(ctx, eq(entries.id, id), 1)
  if (!entry) throw notFound('entry')
  return entry
}

/** Entries whose reply is still owed, by us if not said otherwise, the soonest first. */
export async function listRepliesOwed(ctx: Context, by: 'us' | 'them' = 'us'): Promise<Entry[]> {
  authorize(ctx, 'entry.read')
  const where = and(isLatest(), eq(entries.replyOwedBy, by))
  const owed = await readEntries(ctx, where ?? sql`false`, 1000)
  return owed
    .filter((entry) => !entry.replySettled)
    .sort((a, b) => (a.replyOwedOn ?? '').localeCompare(b.replyOwedOn ?? ''))
}
