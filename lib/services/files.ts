import { and, eq, inArray } from 'drizzle-orm'
import type { Db, Tx } from '@/db/client'
import { entries, fileLinks, files } from '@/db/schema/correspondence'
import { audit } from '@/db/schema/people'
import { downloadHeaders } from '@/lib/files/file-name'
import { keepBytes, type KeptFile } from '@/lib/files/keep-stream'
import { receiveUpload } from '@/lib/files/receive'
import { getFileStore, type FileStore } from '@/lib/files/store'
import { UploadError } from '@/lib/files/upload-error'
import { entryIsVisible, fileIsOpen, type Action } from '@/lib/domain/access'
import { attachmentLimitBytes, type FileLink, type UploadedFile } from '@/lib/schemas/file'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { notFound, ServiceError } from '@/lib/services/errors'
import { isUuid } from '@/lib/services/uuid'

type Link = typeof fileLinks.$inferSelect

export interface UploadOptions {
  /** Bytes; 50 MB if left out. */
  limitBytes?: number
  /** What the sender must be allowed to do; `file.upload` if left out. */
  action?: Action
  /** Looks at the received bytes before they are kept; what it throws refuses them. */
  check?: (localPath: string) => Promise<void>
}

/**
 * Receives the raw body of a request and keeps it; it belongs to nothing yet.
 * @throws ServiceError `too_large`, `unreadable` (short, differing or empty body, faulty headers)
 */
export async function uploadFile(
  ctx: Context,
  request: Request,
  { limitBytes = attachmentLimitBytes, action = 'file.upload', check }: UploadOptions = {},
): Promise<UploadedFile> {
  authorize(ctx, action)
  const received = await refusing(receiveUpload(request, { limitBytes, store: checked(check) }))
  await registerFile(ctx, received, received.name)
  return received
}

/** Keeps bytes that are in memory, such as a file inside an e-mail. */
export async function keepFile(
  ctx: Context,
  bytes: Uint8Array,
  name: string,
  { limitBytes = attachmentLimitBytes, action = 'file.upload' }: UploadOptions = {},
): Promise<UploadedFile> {
  authorize(ctx, action)
  const kept = await refusing(keepBytes(bytes, { store: getFileStore(), limitBytes }))
  await registerFile(ctx, kept, name)
  return { ...kept, name }
}

function checked(check: UploadOptions['check']): FileStore {
  const store = getFileStore()
  if (!check) return store
  const keep = async (localPath: string, sha256: string) => {
    await check(localPath)
    await store.keep(localPath, sha256)
  }
  return { ...store, keep }
}

async function refusing<T>(work: Promise<T>): Promise<T> {
  try {
    return await work
  } catch (error) {
    if (error instanceof UploadError) throw new ServiceError(error.code, error.message)
    throw error
  }
}

/** The bytes are in the store before the row, so that a row never points at nothing. */
async function registerFile(ctx: Context, kept: KeptFile, name: string): Promise<void> {
  const { sha256, size, type } = kept
  await ctx.db.transaction(async (tx) => {
    await tx.insert(files).values({ sha256, size, type }).onConflictDoNothing()
    await recordAudit(ctx, tx, {
      action: 'file.upload',
      subjectKind: 'file',
      subjectId: sha256,
      after: { name, size, type },
    })
  })
}

/**
 * Those of the files that the actor may attach: uploaded by the same person, or open to them in
 * another place. Knowing a hash alone opens nothing.
 */
export async function findAttachable(
  ctx: Context,
  tx: Db | Tx,
  sha256s: readonly string[],
): Promise<Set<string>> {
  authorize(ctx, 'file.read')
  if (sha256s.length === 0) return new Set()
  const wanted = [...sha256s]
  if (ctx.actor.kind === 'job') {
    const rows = await tx.select().from(files).where(inArray(files.sha256, wanted))
    return new Set(rows.map((row) => row.sha256))
  }
  const uploads = await tx
    .select({ sha256: files.sha256 })
    .from(audit)
    .innerJoin(files, eq(files.sha256, audit.subjectId))
    .where(
      and(
        eq(audit.subjectKind, 'file'),
        eq(audit.action, 'file.upload'),
        eq(audit.actorId, ctx.actor.id),
        inArray(audit.subjectId, wanted),
      ),
    )
  const links = await tx.select().from(fileLinks).where(inArray(fileLinks.sha256, wanted))
  const open = await openLinks(ctx, tx, links)
  return new Set([...uploads, ...open].map((row) => row.sha256))
}

export interface NewLink {
  subjectKind: Link['subjectKind']
  subjectId: string
  sha256: string
  name: string
  restrictedTo?: string[]
}

/** Puts files in their place, inside the caller's transaction and after its own checks. */
export async function linkFiles(ctx: Context, tx: Tx, links: readonly NewLink[]): Promise<void> {
  authorize(ctx, 'file.upload')
  if (links.length === 0) return
  await tx
    .insert(fileLinks)
    .values(links.map((link) => ({ ...link, recordedAt: ctx.now, recordedBy: actorId(ctx) })))
}

/**
 * The same for a later revision of a subject: what was restricted stays restricted, and files
 * that the actor cannot see stay attached.
 */
export async function linkRevisedFiles(
  ctx: Context,
  tx: Tx,
  links: readonly NewLink[],
  before: { subjectKind: Link['subjectKind']; subjectId: string; nextId: string },
): Promise<void> {
  authorize(ctx, 'file.upload')
  const { subjectKind, subjectId, nextId } = before
  const earlier = await tx
    .select()
    .from(fileLinks)
    .where(and(eq(fileLinks.subjectKind, subjectKind), eq(fileLinks.subjectId, subjectId)))
  const restricted = earlier.filter((link) => link.restrictedTo !== null)
  const closed = restricted
    .filter((link) => !isOpenTo(ctx, link))
    .map(({ sha256, name, restrictedTo }) => ({
      subjectKind,
      subjectId: nextId,
      sha256,
      name,
      restrictedTo: restrictedTo ?? undefined,
    }))
  const kept = links.map((link) => {
    const known = restricted.find((one) => one.sha256 === link.sha256)
    return { ...link, restrictedTo: link.restrictedTo ?? known?.restrictedTo ?? undefined }
  })
  await linkFiles(ctx, tx, [...kept, ...closed])
}

/** The files of some subjects that are open to the actor, and how many of each are not. */
export async function listFileLinks(
  ctx: Context,
  subjectKind: Link['subjectKind'],
  subjectIds: readonly string[],
): Promise<Map<string, { links: FileLink[]; closed: number }>> {
  authorize(ctx, 'file.read')
  const result = new Map<string, { links: FileLink[]; closed: number }>()
  if (subjectIds.length === 0) return result
  const rows = await ctx.db
    .select({ link: fileLinks, size: files.size, type: files.type })
    .from(fileLinks)
    .innerJoin(files, eq(files.sha256, fileLinks.sha256))
    .where(
      and(eq(fileLinks.subjectKind, subjectKind), inArray(fileLinks.subjectId, [...subjectIds])),
    )
    .orderBy(fileLinks.recordedAt, fileLinks.name)
  for (const { link, size, type } of rows) {
    const held = result.get(link.subjectId) ?? { links: [], closed: 0 }
    if (isOpenTo(ctx, link))
      held.links.push({ id: link.id, sha256: link.sha256, name: link.name, size, type })
    else held.closed += 1
    result.set(link.subjectId, held)
  }
  return result
}

/**
 * A file as a download.
 * @throws ServiceError `not_found` (also where it is not open to the actor), `unavailable` where
 * the store does not hold the bytes.
 */
export async function downloadFile(ctx: Context, linkId: string): Promise<Response> {
  authorize(ctx, 'file.read')
  if (!isUuid(linkId)) throw notFound('file')
  const [row] = await ctx.db
    .select({ link: fileLinks, type: files.type })
    .from(fileLinks)
    .innerJoin(files, eq(files.sha256, fileLinks.sha256))
    .where(eq(fileLinks.id, linkId))
  if (!row || (await openLinks(ctx, ctx.db, [row.link])).length === 0) throw notFound('file')
  const opened = await getFileStore().open(row.link.sha256)
  if (!opened)
    throw new ServiceError('unavailable', 'The file is recorded, but the store does not hold it.')
  const headers = downloadHeaders({ name: row.link.name, type: row.type, size: opened.size })
  return new Response(opened.stream, { headers })
}

/** Those of the links that the actor may open: by the link itself and by what it belongs to. */
async function openLinks(ctx: Context, db: Db | Tx, links: readonly Link[]): Promise<Link[]> {
  const open = links.filter((link) => isOpenTo(ctx, link))
  const entryIds = open.filter((link) => link.subjectKind === 'entry').map((l) => l.subjectId)
  if (entryIds.length === 0 || ctx.actor.kind === 'job') return open
  const { roles } = ctx.actor
  const found = await db
    .select({ id: entries.id, visibility: entries.visibility })
    .from(entries)
    .where(inArray(entries.id, entryIds))
  const visible = new Set(found.filter((row) => entryIsVisible(roles, row)).map((row) => row.id))
  return open.filter((link) => link.subjectKind !== 'entry' || visible.has(link.subjectId))
}

function isOpenTo(ctx: Context, link: Link): boolean {
  return ctx.actor.kind === 'job' || fileIsOpen(ctx.actor.id, link)
}
