import { and, eq, inArray } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import { applicationOrganizations, applications } from '@/db/schema/applications'
import { entries } from '@/db/schema/correspondence'
import { organizations } from '@/db/schema/organizations'
import { people } from '@/db/schema/people'
import { instantOf, localOf } from '@/lib/domain/clocks/zoned'
import { show } from '@/lib/schemas/common'
import type { EntryInput } from '@/lib/schemas/entry'
import type { Context } from '@/lib/services/context'
import { invalid, type FieldError } from '@/lib/services/errors'
import { rootOf } from '@/lib/services/entry-reading'
import { findAttachable } from '@/lib/services/files'

/** What the database adds to an entry's input. */
export interface CheckedEntry {
  at: Date
  zone: string
  answersRoot: string | null
}

const aDayMs = 24 * 60 * 60 * 1000

/**
 * Checks an entry against what is recorded, and holds the applications it concerns: in the order
 * of their ids, so that two entries about the same ones wait for each other instead of locking up.
 * @throws ServiceError `invalid` with every field at fault.
 */
export async function checkEntry(ctx: Context, tx: Tx, input: EntryInput): Promise<CheckedEntry> {
  const errors = await applicationErrors(tx, input)
  errors.push(...(await revisionErrors(tx, input)))
  errors.push(...(await attachmentErrors(ctx, tx, input)))
  const zone = await zoneOf(ctx, tx, input, errors)
  const at = momentOf(ctx, input, zone, errors)
  const answersRoot = input.answersId ? ((await rootOf(tx, input.answersId)) ?? null) : null
  if (input.answersId && !answersRoot)
    errors.push({ path: 'answersId', message: 'There is no such entry to answer.' })
  if (errors.length > 0 || !at || !zone) throw invalid(errors)
  return { at, zone, answersRoot }
}

async function applicationErrors(tx: Tx, input: EntryInput): Promise<FieldError[]> {
  const wanted = input.applications.map((one) => one.applicationId)
  const found = await tx
    .select({ id: applications.id })
    .from(applications)
    .where(inArray(applications.id, wanted))
    .orderBy(applications.id)
    .for(input.facts.length > 0 ? 'update' : 'key share')
  const ids = new Set(found.map((row) => row.id))
  return wanted.flatMap((id, index) =>
    ids.has(id)
      ? []
      : [{ path: `applications.${index}.applicationId`, message: 'There is no such application.' }],
  )
}

async function revisionErrors(tx: Tx, input: EntryInput): Promise<FieldError[]> {
  if (!input.revisesId) return []
  const [base] = await tx.select().from(entries).where(eq(entries.id, input.revisesId))
  return base ? [] : [{ path: 'revisesId', message: 'There is no such entry to revise.' }]
}

async function attachmentErrors(ctx: Context, tx: Tx, input: EntryInput): Promise<FieldError[]> {
  const { attachments } = input
  const attachable = await findAttachable(
    ctx,
    tx,
    attachments.map((one) => one.sha256),
  )
  const named = [...new Set(attachments.flatMap((one) => one.restrictedTo ?? []))]
  const rows = named.length
    ? await tx.select({ id: people.id }).from(people).where(inArray(people.id, named))
    : []
  const known = new Set(rows.map((row) => row.id))
  return attachments.flatMap((one, index) => {
    const path = `attachments.${index}`
    const errors: FieldError[] = []
    if (!attachable.has(one.sha256))
      errors.push({
        path: `${path}.sha256`,
        message: `The file "${one.name}" was not uploaded here, or is not open to you.`,
      })
    if (one.restrictedTo?.some((id) => !known.has(id)))
      errors.push({ path: `${path}.restrictedTo`, message: 'There is no such person.' })
    return errors
  })
}

/** The zone typed, else that of the organization, else that of the application's operator. */
async function zoneOf(
  ctx: Context,
  tx: Tx,
  input: EntryInput,
  errors: FieldError[],
): Promise<string | undefined> {
  const organization = input.organizationId
    ? await organizationZone(tx, input.organizationId)
    : undefined
  if (input.organizationId && !organization)
    errors.push({ path: 'organizationId', message: 'There is no such organization.' })
  const zone = input.zone ?? organization ?? (await operatorZone(tx, input))
  if (zone === undefined) return ctx.actor.kind === 'person' ? ctx.actor.zone : 'UTC'
  if (isZone(zone)) return zone
  errors.push({
    path: 'zone',
    message: `Found ${show(zone)}; a zone such as America/Denver is needed.`,
  })
  return undefined
}

async function organizationZone(tx: Tx, id: string): Promise<string | undefined> {
  const query = tx.select({ zone: organizations.zone }).from(organizations)
  return (await query.where(eq(organizations.id, id)))[0]?.zone
}

async function operatorZone(tx: Tx, input: EntryInput): Promise<string | undefined> {
  const first = input.applications[0]
  if (!first) return undefined
  const [row] = await tx
    .select({ zone: organizations.zone })
    .from(applicationOrganizations)
    .innerJoin(organizations, eq(organizations.id, applicationOrganizations.organizationId))
    .where(
      and(
        eq(applicationOrganizations.applicationId, first.applicationId),
        eq(applicationOrganizations.role, 'operator'),
      ),
    )
  return row?.zone
}

function isZone(zone: string): boolean {
  try {
    new Intl.DateTimeFormat('en-US', { timeZone: zone })
    return true
  } catch {
    return false
  }
}

/** The instant of the local date and hour; an hour that a clock change skips is refused. */
function momentOf(
  ctx: Context,
  input: EntryInput,
  zone: string | undefined,
  errors: FieldError[],
): Date | undefined {
  if (!zone) return undefined
  const instant = instantOf(input.on, input.time, zone)
  if (localOf(instant, zone).time.slice(0, 5) !== input.time) {
    errors.push({
      path: 'time',
      message: `There is no ${input.time} on ${input.on} in ${zone}: the clocks went forward.`,
    })
    return undefined
  }
  const at = new Date(instant)
  if (at.getTime() <= ctx.now.getTime() + aDayMs) return at
  errors.push({
    path: 'on',
    message: `Found ${input.on} ${input.time}, which is still ahead; record what has been sent, received or said.`,
  })
  return undefined
}
