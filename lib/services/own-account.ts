import { eq, sql } from 'drizzle-orm'
import { people } from '@/db/schema/people'
import type { Me, MeChange, PasswordChange } from '@/lib/schemas/person'
import { recordAudit } from '@/lib/services/audit'
import { authorize, personOf, type Context } from '@/lib/services/context'
import { invalid, notFound } from '@/lib/services/errors'
import { forgiveTry, passwordLimits, takeTry } from '@/lib/services/limiter'
import { hashPassword, passwordFits } from '@/lib/services/passwords'

/** The person acting, with the address that signs in. */
export async function getMe(ctx: Context): Promise<Me> {
  authorize(ctx, 'self.read')
  const { id, roles } = personOf(ctx)
  const [row] = await ctx.db.select().from(people).where(eq(people.id, id))
  if (!row) throw notFound('person')
  return { id, name: row.name, email: row.email, zone: row.zone, roles }
}

/** Changes one's own name and time zone. */
export async function changeMe(ctx: Context, change: MeChange): Promise<Me> {
  authorize(ctx, 'self.write')
  const { id, name, zone } = personOf(ctx)
  await ctx.db.transaction(async (tx) => {
    await tx.update(people).set(change).where(eq(people.id, id))
    await recordAudit(ctx, tx, {
      action: 'self.change',
      subjectKind: 'person',
      subjectId: id,
      before: { name, zone },
      after: change,
    })
  })
  return getMe(ctx)
}

/**
 * Chooses another password and ends every session of the person, the asking one included. API
 * tokens stay until they are revoked.
 * @throws ServiceError `invalid` where the present password does not fit; `too_often`
 */
export async function changePassword(ctx: Context, input: PasswordChange): Promise<void> {
  authorize(ctx, 'self.write')
  const { id } = personOf(ctx)
  const limits = passwordLimits(id)
  await takeTry(ctx.db, limits, ctx.now)
  const [row] = await ctx.db.select().from(people).where(eq(people.id, id))
  if (!(await passwordFits(row?.passwordHash, input.current))) {
    throw invalid([{ path: 'current', message: 'This is not your present password.' }])
  }
  await forgiveTry(ctx.db, limits)
  const passwordHash = await hashPassword(input.password)
  await ctx.db.transaction(async (tx) => {
    await tx
      .update(people)
      .set({ passwordHash, sessionVersion: sql`${people.sessionVersion} + 1` })
      .where(eq(people.id, id))
    const subject = { subjectKind: 'person', subjectId: id }
    await recordAudit(ctx, tx, { action: 'self.password', ...subject })
  })
}
