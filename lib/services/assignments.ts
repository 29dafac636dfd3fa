import { and, eq } from 'drizzle-orm'
import { applications, assignments } from '@/db/schema/applications'
import { people } from '@/db/schema/people'
import type { AssignmentInput } from '@/lib/schemas/assignment'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { invalid, notFound } from '@/lib/services/errors'

/**
 * Names who holds an obligation; the last word counts, earlier ones stay on record.
 * @throws ServiceError `not_found`, `invalid` for a person who is not active.
 */
export async function assignObligation(
  ctx: Context,
  input: AssignmentInput,
): Promise<{ personId: string; name: string }> {
  authorize(ctx, 'obligation.assign')
  return ctx.db.transaction(async (tx) => {
    const [application] = await tx
      .select({ id: applications.id })
      .from(applications)
      .where(eq(applications.id, input.applicationId))
    if (!application) throw notFound('application')
    const [person] = await tx
      .select({ id: people.id, name: people.name })
      .from(people)
      .where(and(eq(people.id, input.personId), eq(people.active, true)))
    if (!person) throw invalid([{ path: 'personId', message: 'Choose a person who is active.' }])
    await tx.insert(assignments).values({ ...input, recordedAt: ctx.now, recordedBy: actorId(ctx) })
    await recordAudit(ctx, tx, {
      action: 'obligation.assign',
      subjectKind: 'application',
      subjectId: input.applicationId,
      after: input,
    })
    return { personId: person.id, name: person.name }
  })
}
