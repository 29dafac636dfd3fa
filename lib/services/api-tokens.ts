import { and, desc, eq, isNull } from 'drizzle-orm'
import { apiTokens } from '@/db/schema/people'
import { uuid } from '@/lib/schemas/common'
import type { ApiToken, NewApiToken, TokenInput } from '@/lib/schemas/person'
import { recordAudit } from '@/lib/services/audit'
import { authorize, personOf, type Context } from '@/lib/services/context'
import { notFound, ServiceError } from '@/lib/services/errors'
import { hashOfSecret, newSecret } from '@/lib/services/secrets'

/** Marks a secret as ours, so that a scanner of leaked secrets can know it. */
const prefix = 'ls_'

/** One's own tokens that still open, newest first. */
export async function listTokens(ctx: Context): Promise<{ items: ApiToken[] }> {
  authorize(ctx, 'self.read')
  const { id } = personOf(ctx)
  const rows = await ctx.db
    .select()
    .from(apiTokens)
    .where(and(eq(apiTokens.personId, id), isNull(apiTokens.revokedAt)))
    .orderBy(desc(apiTokens.createdAt))
  return { items: rows.map(tokenOfRow) }
}

/**
 * Makes a token that can do what its person can. Its secret is in this answer alone.
 * @throws ServiceError `conflict` where this id made a token already: its secret cannot be shown again
 */
export async function createToken(ctx: Context, input: TokenInput): Promise<NewApiToken> {
  authorize(ctx, 'self.write')
  const { id: personId } = personOf(ctx)
  const secret = newSecret(prefix)
  return ctx.db.transaction(async (tx) => {
    const [row] = await tx
      .insert(apiTokens)
      .values({ ...input, hash: hashOfSecret(secret), personId, createdAt: ctx.now })
      .onConflictDoNothing()
      .returning()
    if (!row) {
      throw new ServiceError('conflict', 'This token was made already. Revoke it and make another.')
    }
    await recordAudit(ctx, tx, { action: 'token.create', ...subject(row.id), after: input })
    return { ...tokenOfRow(row), secret }
  })
}

/** Ends a token of one's own; ending it twice is the same. @throws ServiceError `not_found` */
export async function revokeToken(ctx: Context, id: string): Promise<void> {
  authorize(ctx, 'self.write')
  const { id: personId } = personOf(ctx)
  if (!uuid.safeParse(id).success) throw notFound('token')
  await ctx.db.transaction(async (tx) => {
    const own = and(eq(apiTokens.id, id), eq(apiTokens.personId, personId))
    const [row] = await tx.select().from(apiTokens).where(own)
    if (!row) throw notFound('token')
    if (row.revokedAt) return
    await tx.update(apiTokens).set({ revokedAt: ctx.now }).where(own)
    await recordAudit(ctx, tx, { action: 'token.revoke', ...subject(id) })
  })
}

const subject = (id: string) => ({ subjectKind: 'api_token', subjectId: id })

function tokenOfRow(row: typeof apiTokens.$inferSelect): ApiToken {
  return {
    id: row.id,
    name: row.name,
    createdAt: row.createdAt.toISOString(),
    lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
  }
}
