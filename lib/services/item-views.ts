import { and, asc, desc, eq, inArray } from 'drizzle-orm'
import { acknowledgements, assignments, obligations } from '@/db/schema/applications'
import { people } from '@/db/schema/people'
import type { Db, Tx } from '@/db/client'
import { standing } from '@/lib/domain/clocks/standing'
import { workingDue } from '@/lib/domain/clocks/working-due'
import type { StepParty } from '@/lib/domain/clocks/procedure'
import type { ItemView } from '@/lib/schemas/application'
import type { ApplicationParties, OrganizationParty } from '@/lib/services/parties'

export type ObligationRow = typeof obligations.$inferSelect

/** The organization whose calendar and hour a step's party counts by. */
export function organizationFor(parties: ApplicationParties, party: StepParty): OrganizationParty {
  if (party === 'applicant' || party === 'both' || party === 'other') return parties.operator
  return parties[party] ?? parties.operator
}

export interface Holders {
  owner(row: ObligationRow): { id: string; name: string } | null
  acknowledged(row: ObligationRow): ItemView['acknowledged']
}

/** Who holds and who acknowledged the obligations of these applications. */
export async function holdersOf(db: Db | Tx, applicationIds: string[]): Promise<Holders> {
  if (applicationIds.length === 0) return { owner: () => null, acknowledged: () => null }
  const assigned = await db
    .select({ assignment: assignments, name: people.name })
    .from(assignments)
    .innerJoin(people, eq(people.id, assignments.personId))
    .where(inArray(assignments.applicationId, applicationIds))
    .orderBy(asc(assignments.recordedAt))
  const acknowledgedRows = await db
    .select({ acknowledgement: acknowledgements, name: people.name })
    .from(acknowledgements)
    .innerJoin(people, eq(people.id, acknowledgements.personId))
    .where(inArray(acknowledgements.applicationId, applicationIds))
    .orderBy(desc(acknowledgements.recordedAt))
  return {
    owner(row) {
      const mine = assigned.filter(
        ({ assignment }) => assignment.applicationId === row.applicationId,
      )
      const of = (step: string, instance: number, obligation: string) =>
        mine.findLast(
          ({ assignment: one }) =>
            one.step === step && one.instance === instance && one.obligation === obligation,
        )
      const found =
        of(row.step, row.instance, row.obligation) ??
        of(row.step, row.instance, '') ??
        of('*', 0, row.ownerRole ?? '')
      return found ? { id: found.assignment.personId, name: found.name } : null
    },
    acknowledged(row) {
      const found = acknowledgedRows.find(
        ({ acknowledgement: one }) =>
          one.applicationId === row.applicationId &&
          one.step === row.step &&
          one.instance === row.instance &&
          one.obligation === row.obligation &&
          one.dueOn === workingDue(row),
      )
      if (!found) return null
      const { reason, untilOn, recordedAt } = found.acknowledgement
      return { by: found.name, reason, untilOn: untilOn!, at: recordedAt.toISOString() }
    },
  }
}

/** An obligation as it stands at `now`. */
export function itemView(
  row: ObligationRow,
  parties: ApplicationParties,
  holders: Holders,
  now: Date,
): ItemView {
  const dueAt = row.dueAt?.toISOString() ?? null
  return {
    step: row.step,
    instance: row.instance,
    obligation: row.obligation,
    title: row.title,
    short: row.short,
    stage: row.stage,
    party: row.party,
    kind: row.kind,
    onLine: row.onLine,
    ownerRole: row.ownerRole,
    consequence: row.consequence,
    status: row.status,
    provisional: row.provisional,
    outcome: row.outcome,
    startOn: row.startOn,
    dueOn: row.dueOn,
    dueAt,
    zone: row.zone,
    statedDueOn: row.statedDueOn,
    startBy: row.startBy,
    doneOn: row.doneOn,
    doneLate: row.doneLate,
    hourRecorded: row.hourRecorded,
    moneyTargetMinor: row.moneyTargetMinor,
    moneyHeldMinor: row.moneyHeldMinor,
    derivation: row.derivation,
    source: row.source,
    standing: standing(
      { ...row, dueAt },
      now.toISOString(),
      organizationFor(parties, row.party).calendar,
    ),
    owner: holders.owner(row),
    acknowledged: holders.acknowledged(row),
  }
}

/** The obligations of an application in drawing order. */
export async function obligationRowsOf(
  db: Db | Tx,
  applicationId: string,
): Promise<ObligationRow[]> {
  return db
    .select()
    .from(obligations)
    .where(
      and(eq(obligations.applicationId, applicationId), eq(obligations.subjectKind, 'application')),
    )
    .orderBy(asc(obligations.position), asc(obligations.obligation))
}
