import { and, asc, eq } from 'drizzle-orm'
import { applications, obligations, projects } from '@/db/schema/applications'
import { people, personRoles } from '@/db/schema/people'
import type { Tx } from '@/db/client'
import { localOf } from '@/lib/domain/clocks/zoned'
import { routes } from '@/lib/routes'
import { recordAudit } from '@/lib/services/audit'
import { authorize, type Context } from '@/lib/services/context'
import { hashOfInput } from '@/lib/services/input-hash'
import { log } from '@/lib/services/log'
import { queueNotices, siteUrl } from '@/lib/services/notices'
import { computeSchedule, obligationRows } from '@/lib/services/projection'
import { projectionDifference } from '@/templates/notices/projection-difference'

export interface ProjectionReport {
  checked: number
  differences: { applicationId: string; project: string; keys: string[] }[]
}

/**
 * Computes every application anew from its facts and compares each column with what is kept.
 * Changes nothing; a difference is logged, put on record and reported to the administrators.
 */
export async function compareProjections(ctx: Context): Promise<ProjectionReport> {
  authorize(ctx, 'job.run')
  const rows = await ctx.db
    .select({ id: applications.id, project: projects.name })
    .from(applications)
    .innerJoin(projects, eq(projects.id, applications.projectId))
    .orderBy(asc(projects.name))
  const differences: ProjectionReport['differences'] = []
  for (const { id, project } of rows) {
    const keys = await ctx.db.transaction((tx) => differingKeys(tx, id))
    if (keys.length > 0) differences.push({ applicationId: id, project, keys })
  }
  const report = { checked: rows.length, differences }
  if (differences.length > 0) await reportDifferences(ctx, report)
  return report
}

/** The obligations of which any column differs, or that stand on one side only. */
async function differingKeys(tx: Tx, applicationId: string): Promise<string[]> {
  const [application] = await tx
    .select({ lastSeq: applications.lastSeq })
    .from(applications)
    .where(eq(applications.id, applicationId))
    .for('share')
  const stored = await tx
    .select()
    .from(obligations)
    .where(
      and(eq(obligations.subjectKind, 'application'), eq(obligations.subjectId, applicationId)),
    )
  const { schedule } = await computeSchedule(tx, applicationId)
  const fresh = obligationRows(applicationId, application!.lastSeq, schedule.items)
  const kept = new Map(stored.map(({ id: _id, ...row }) => [keyOf(row), contentOf(row)]))
  const computed = new Map(fresh.map((row) => [keyOf(row), contentOf(row)]))
  return [...new Set([...kept.keys(), ...computed.keys()])].filter(
    (key) => kept.get(key) !== computed.get(key),
  )
}

function keyOf(row: { step: string; instance: number; obligation?: string }): string {
  return `${row.step}, round ${row.instance}${row.obligation ? `, ${row.obligation}` : ''}`
}

/** Every column, whatever the order in which the database gives JSON keys back. */
function contentOf(row: { dueAt?: Date | null }): string {
  return hashOfInput({ ...row, dueAt: row.dueAt?.toISOString() ?? null })
}

async function reportDifferences(ctx: Context, report: ProjectionReport): Promise<void> {
  log.error({ report }, 'kept dates differ from the facts')
  const lines = report.differences.map((one) => `${one.project}: ${one.keys.join('; ')}.`)
  await ctx.db.transaction(async (tx) => {
    const administrators = await tx
      .select({ id: people.id, name: people.name, email: people.email, zone: people.zone })
      .from(people)
      .innerJoin(personRoles, eq(personRoles.personId, people.id))
      .where(and(eq(people.active, true), eq(personRoles.role, 'administrator')))
    await recordAudit(ctx, tx, {
      action: 'projection.differs',
      subjectKind: 'projection',
      subjectId: ctx.now.toISOString(),
      after: report,
    })
    await queueNotices(
      ctx,
      tx,
      administrators.map((person) => {
        const on = localOf(ctx.now.toISOString(), person.zone).on
        return {
          subjectKind: 'person' as const,
          subjectKey: person.id,
          rung: `projection_differs:${on}`,
          personId: person.id,
          to: person.email,
          body: projectionDifference({
            personName: person.name,
            on,
            checked: report.checked,
            differences: lines,
            url: siteUrl(routes.pipeline()),
          }),
        }
      }),
    )
  })
}
