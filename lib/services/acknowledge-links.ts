import { and, eq, sql } from 'drizzle-orm'
import type { Db, Tx } from '@/db/client'
import { applications, applicationStates, notices, projects } from '@/db/schema/applications'
import { people } from '@/db/schema/people'
import type { Role } from '@/lib/domain/access'
import { nextDateRange, obligationOfKey } from '@/lib/domain/obligations'
import { localOf } from '@/lib/domain/clocks/zoned'
import type { Acknowledgement, LinkAcknowledgement } from '@/lib/schemas/notice'
import { findObligation, recordAcknowledgement, runningDue } from '@/lib/services/acknowledgements'
import { ServiceError } from '@/lib/services/errors'
import type { Visit } from '@/lib/services/one-time-links'
import { hashOfSecret } from '@/lib/services/secrets'

const linkLifeMs = 60 * 24 * 60 * 60 * 1000

/** What an acknowledge link is good for. */
export type AcknowledgeLink =
  | {
      state: 'open'
      applicationId: string
      projectName: string
      requestNo: string | null
      title: string
      dueOn: string
      /** ISO instant; null where no hour is known. */
      dueAt: string | null
      zone: string
      consequence: string
      personName: string
      /** Days the next date may lie in. */
      from: string
      to: string
    }
  | { state: keyof typeof refusals }

const refusals = {
  unknown: 'This link is not known here. Check that it was copied whole, or sign in.',
  expired: 'This link has expired: it opens for 60 days. Sign in and open the application.',
  moved: 'The due date has moved since this e-mail. A newer notice has its own link.',
  closed: 'This clock is not running any more: nothing to acknowledge.',
}

/** The sentence for a link that does not open. */
export function refusalOf(state: keyof typeof refusals): string {
  return refusals[state]
}

/** Looks at a link without changing anything: a scanner of e-mails may do that as well. */
export async function inspectAcknowledgeLink(
  visit: Pick<Visit, 'db' | 'now'>,
  secret: string,
): Promise<AcknowledgeLink> {
  const notice = await findNotice(visit.db, secret)
  const refused = refusedAtOnce(visit.now, notice)
  if (refused) return { state: refused }
  const found = notice!
  const obligation = await findObligation(visit.db, refOf(found))
  const due = obligation && runningDue(obligation)
  if (!due) return { state: 'closed' }
  if (due.dueOn !== found.dueOn) return { state: 'moved' }
  const { title, zone, consequence } = obligation
  const range = nextDateRange(due.dueOn, localOf(visit.now.toISOString(), zone).on)
  return {
    state: 'open',
    applicationId: found.applicationId!,
    projectName: found.projectName ?? '',
    requestNo: found.requestNo,
    personName: found.personName,
    title,
    ...due,
    zone,
    consequence: consequence.say,
    ...range,
  }
}

/**
 * Acknowledges by the secret of a notice, as the person it was sent to. The secret is the
 * authorization; it opens nothing else.
 * @throws ServiceError `conflict` for a link that does not open, `invalid` for a wrong next date
 */
export async function acknowledgeByLink(
  visit: Visit,
  { secret, ...answer }: LinkAcknowledgement,
): Promise<Acknowledgement> {
  return visit.db.transaction(async (tx) => {
    const notice = await findNotice(tx, secret)
    const refused = refusedAtOnce(visit.now, notice)
    if (refused) throw new ServiceError('conflict', refusals[refused])
    const { personId, personName, roles, zone, dueOn } = notice!
    const actor = { kind: 'person' as const, id: personId, name: personName, roles, zone }
    const ctx = { actor, db: visit.db, now: visit.now, requestId: visit.requestId }
    return recordAcknowledgement(ctx, tx, { ...answer, ...refOf(notice!), dueOn })
  })
}

type FoundNotice = NonNullable<Awaited<ReturnType<typeof findNotice>>>

async function findNotice(db: Db | Tx, secret: string) {
  const [row] = await db
    .select({
      key: notices.subjectKey,
      dueOn: notices.dueOn,
      createdAt: notices.createdAt,
      applicationId: notices.applicationId,
      projectName: projects.name,
      requestNo: sql<string | null>`${applicationStates.terms} ->> 'requestNo'`,
      personId: people.id,
      personName: people.name,
      isActive: people.active,
      zone: people.zone,
      roles: sql<Role[]>`array(
        select held.role from person_roles held where held.person_id = ${people.id}
      )`,
    })
    .from(notices)
    .innerJoin(people, eq(people.id, notices.personId))
    .leftJoin(applications, eq(applications.id, notices.applicationId))
    .leftJoin(projects, eq(projects.id, applications.projectId))
    .leftJoin(applicationStates, eq(applicationStates.applicationId, notices.applicationId))
    .where(
      and(eq(notices.ackSecretHash, hashOfSecret(secret)), eq(notices.subjectKind, 'obligation')),
    )
  return row ?? null
}

function refusedAtOnce(now: Date, notice: FoundNotice | null): 'unknown' | 'expired' | null {
  if (!notice?.isActive || !notice.applicationId) return 'unknown'
  return now.getTime() - notice.createdAt.getTime() > linkLifeMs ? 'expired' : null
}

function refOf({ key, applicationId }: FoundNotice) {
  const { step, instance, obligation } = obligationOfKey(key)
  return { applicationId: applicationId!, step, instance, obligation }
}
