import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import type { Db, Tx } from '@/db/client'
import { oneTimeTokens, people } from '@/db/schema/people'
import { routes } from '@/lib/routes'
import type { LinkAcceptance, ResetRequest } from '@/lib/schemas/person'
import { recordAudit } from '@/lib/services/audit'
import { authorize, type Context } from '@/lib/services/context'
import { ServiceError } from '@/lib/services/errors'
import { queueNotice, siteUrl } from '@/lib/services/notices'
import { hashPassword } from '@/lib/services/passwords'
import { hashOfSecret, newSecret } from '@/lib/services/secrets'
import { invitationLetter } from '@/templates/notices/invitation'
import { resetLetter } from '@/templates/notices/reset'

export type LinkPurpose = 'invitation' | 'reset'

const hour = 60 * 60 * 1000

/** How long a link opens, in milliseconds. */
export const linkLifeMs: Record<LinkPurpose, number> = { invitation: 7 * 24 * hour, reset: hour }

interface Addressee {
  id: string
  name: string
  email: string
}

/**
 * Makes a new invitation and queues its e-mail, inside the caller's transaction.
 *
 * The secret link stands in the body of the outbox row, because the row is what gets sent. That is
 * bearable: no page shows a body, the sender blanks the link once the e-mail was accepted, the link
 * works once and for a week at most, and whoever reads the outbox table can rewrite the people too.
 */
export async function sendInvitation(ctx: Context, tx: Tx, person: Addressee): Promise<void> {
  authorize(ctx, 'person.write')
  await sendLink(ctx, tx, 'invitation', person)
}

/** What an unsigned visitor brings along: no actor, hence no roles. */
export interface Visit {
  db: Db
  now: Date
  requestId: string
}

/**
 * Queues a reset link where the address belongs to an active person; says nothing either way, so
 * that nobody learns which addresses are known. One who never accepted gets the invitation anew.
 */
export async function requestReset(visit: Visit, { email }: ResetRequest): Promise<void> {
  const [person] = await visit.db
    .select({
      id: people.id,
      name: people.name,
      email: people.email,
      zone: people.zone,
      hasPassword: sql<boolean>`${people.passwordHash} is not null`,
    })
    .from(people)
    .where(and(eq(people.email, email), eq(people.active, true)))
  if (!person) return
  const ctx = contextOfVisit(visit, person)
  const purpose = person.hasPassword ? 'reset' : 'invitation'
  await visit.db.transaction((tx) => sendLink(ctx, tx, purpose, person))
}

async function sendLink(ctx: Context, tx: Tx, purpose: LinkPurpose, to: Addressee): Promise<void> {
  const secret = newSecret()
  const hash = hashOfSecret(secret)
  const expiresAt = new Date(ctx.now.getTime() + linkLifeMs[purpose])
  await endOpenLinks(ctx, tx, to.id)
  await tx
    .insert(oneTimeTokens)
    .values({ hash, purpose, personId: to.id, expiresAt, createdAt: ctx.now })
  const path = purpose === 'invitation' ? routes.invitation(secret) : routes.resetPassword(secret)
  const letter = purpose === 'invitation' ? invitationLetter : resetLetter
  await queueNotice(ctx, tx, {
    subjectKind: 'person',
    subjectKey: `${purpose}:${hash.slice(0, 16)}`,
    rung: purpose,
    personId: to.id,
    to: to.email,
    body: letter({ name: to.name, email: to.email, link: siteUrl(path) }),
  })
}

async function endOpenLinks(ctx: Context, tx: Tx, personId: string): Promise<void> {
  await tx
    .update(oneTimeTokens)
    .set({ expiresAt: ctx.now })
    .where(
      and(
        eq(oneTimeTokens.personId, personId),
        isNull(oneTimeTokens.usedAt),
        gt(oneTimeTokens.expiresAt, ctx.now),
      ),
    )
}

export type LinkState =
  { state: 'open'; name: string; email: string } | { state: 'used' | 'expired' | 'unknown' }

/** What a link is good for at this instant, without using it. */
export async function inspectLink(
  visit: Pick<Visit, 'db' | 'now'>,
  purpose: LinkPurpose,
  secret: string,
): Promise<LinkState> {
  const [row] = await visit.db
    .select({
      usedAt: oneTimeTokens.usedAt,
      expiresAt: oneTimeTokens.expiresAt,
      name: people.name,
      email: people.email,
      active: people.active,
    })
    .from(oneTimeTokens)
    .innerJoin(people, eq(people.id, oneTimeTokens.personId))
    .where(and(eq(oneTimeTokens.hash, hashOfSecret(secret)), eq(oneTimeTokens.purpose, purpose)))
  if (!row || !row.active) return { state: 'unknown' }
  if (row.usedAt) return { state: 'used' }
  if (row.expiresAt <= visit.now) return { state: 'expired' }
  return { state: 'open', name: row.name, email: row.email }
}

const refusals = {
  used: 'This link was used already. Sign in, or ask for a new link.',
  expired: 'This link has expired. Ask for a new one.',
  unknown: 'This link is not known here. Check that it was copied whole, or ask for a new one.',
}

/**
 * Uses a link once: the chosen password is kept and every older session of the person ends.
 * @throws ServiceError `conflict` for a link that was used, has expired or is unknown
 */
export async function acceptLink(
  visit: Visit,
  { secret, password }: LinkAcceptance,
): Promise<{ email: string }> {
  const hash = hashOfSecret(secret)
  const purpose = await purposeOf(visit.db, hash)
  const link = await inspectLink(visit, purpose ?? 'reset', secret)
  if (link.state !== 'open') throw refusal(link.state)
  const passwordHash = await hashPassword(password)
  return visit.db.transaction(async (tx) => {
    const personId = await useLink(visit, tx, hash)
    const [person] = await tx
      .update(people)
      .set({ passwordHash, sessionVersion: sql`${people.sessionVersion} + 1` })
      .where(and(eq(people.id, personId), eq(people.active, true)))
      .returning()
    if (!person) throw refusal('unknown')
    const ctx = contextOfVisit(visit, person)
    const row = { action: `link.${purpose}`, subjectKind: 'person', subjectId: person.id }
    await recordAudit(ctx, tx, row)
    return { email: person.email }
  })
}

async function purposeOf(db: Db, hash: string): Promise<LinkPurpose | undefined> {
  const [row] = await db
    .select({ purpose: oneTimeTokens.purpose })
    .from(oneTimeTokens)
    .where(eq(oneTimeTokens.hash, hash))
  return row?.purpose
}

// One statement decides, so that of two submits at the same moment one is told "used already".
async function useLink(visit: Visit, tx: Tx, hash: string): Promise<string> {
  const [used] = await tx
    .update(oneTimeTokens)
    .set({ usedAt: visit.now })
    .where(
      and(
        eq(oneTimeTokens.hash, hash),
        isNull(oneTimeTokens.usedAt),
        gt(oneTimeTokens.expiresAt, visit.now),
      ),
    )
    .returning({ personId: oneTimeTokens.personId })
  if (!used) throw refusal('used')
  return used.personId
}

function refusal(state: keyof typeof refusals): ServiceError {
  return new ServiceError('conflict', refusals[state])
}

// The link stands for the person it was sent to; it carries no roles.
function contextOfVisit(visit: Visit, { id, name, zone }: Addressee & { zone: string }): Context {
  return { ...visit, actor: { kind: 'person', id, name, zone, roles: [] } }
}
