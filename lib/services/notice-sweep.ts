import type { Tx } from '@/db/client'
import { isOurs, rungsDue, type DueRung } from '@/lib/domain/notices'
import { obligationKey } from '@/lib/domain/obligations'
import { businessDaysTo } from '@/lib/domain/clocks/standing'
import { localOf } from '@/lib/domain/clocks/zoned'
import { routes } from '@/lib/routes'
import { authorize, type Context } from '@/lib/services/context'
import { log } from '@/lib/services/log'
import {
  assignedTo,
  calendarOf,
  readSweep,
  silentUntil,
  type OpenObligation,
  type Sweep,
  type SweepPerson,
} from '@/lib/services/notice-sweep-reading'
import { queueNotices, siteUrl, type QueuedNotice } from '@/lib/services/notices'
import { hashOfSecret, newSecret } from '@/lib/services/secrets'
import { clockNotice } from '@/templates/notices/clock-notice'

interface Candidate {
  obligation: OpenObligation
  rung: DueRung
  person: SweepPerson
}

/**
 * Looks at every open obligation with a due date and puts the notices whose rung has come into the
 * outbox. Safe to run at any time and in several workers at once: what is there stays as it is.
 * @returns how many notices were new
 */
export async function sweepNotices(ctx: Context): Promise<number> {
  authorize(ctx, 'notice.send')
  return ctx.db.transaction(async (tx) => {
    const sweep = await readSweep(tx)
    const candidates = sweep.obligations.flatMap((one) => candidatesOf(ctx, sweep, one))
    const fresh = candidates.filter((one) => !sweep.queued.has(candidateKey(one)))
    return queueAll(ctx, tx, sweep, fresh)
  })
}

function candidatesOf(ctx: Context, sweep: Sweep, obligation: OpenObligation): Candidate[] {
  try {
    const rungs = rungsDue({
      obligation: { ...obligation, effect: obligation.consequence.effect },
      now: ctx.now,
      zone: obligation.zone,
      calendar: calendarOf(sweep, obligation),
      acknowledgedUntil: silentUntil(sweep, obligation),
      assignedId: assignedTo(sweep, obligation),
      people: [...sweep.people.values()],
    })
    return rungs.flatMap((rung) =>
      rung.personIds.map((id) => ({ obligation, rung, person: sweep.people.get(id)! })),
    )
  } catch (error) {
    // One obligation that cannot be read must not silence all others.
    log.error({ error, obligation: obligationKey(obligation) }, 'no notice could be made')
    return []
  }
}

function candidateKey({ obligation, rung, person }: Candidate): string {
  return [obligationKey(obligation), obligation.dueOn, rung.key, person.id].join('|')
}

async function queueAll(ctx: Context, tx: Tx, sweep: Sweep, fresh: Candidate[]): Promise<number> {
  let added = 0
  const batch = 200
  for (let from = 0; from < fresh.length; from += batch) {
    const notices = fresh.slice(from, from + batch).map((one) => noticeOf(ctx, sweep, one))
    added += await queueNotices(ctx, tx, notices)
  }
  return added
}

function noticeOf(ctx: Context, sweep: Sweep, candidate: Candidate): QueuedNotice {
  const { obligation, rung, person } = candidate
  const secret = newSecret()
  return {
    subjectKind: 'obligation',
    subjectKey: obligationKey(obligation),
    applicationId: obligation.applicationId,
    dueOn: obligation.dueOn,
    rung: rung.key,
    personId: person.id,
    to: person.email,
    body: bodyOf(ctx, sweep, candidate, secret),
    ackSecretHash: hashOfSecret(secret),
  }
}

function bodyOf(ctx: Context, sweep: Sweep, candidate: Candidate, secret: string) {
  const { obligation, rung, person } = candidate
  const { applicationId, dueOn, dueAt, zone, consequence, source } = obligation
  const today = localOf(ctx.now.toISOString(), zone).on
  const operator = sweep.organizations.get(`${applicationId}/operator`)
  return clockNotice({
    says: rung.says,
    personName: person.name,
    projectName: obligation.projectName ?? 'Our own date',
    requestNo: obligation.requestNo,
    title: obligation.title,
    organizationName: operator?.name ?? null,
    isOurs: isOurs(obligation.party),
    dueOn,
    dueAt,
    zone,
    today,
    businessDaysLeft: businessDaysTo(calendarOf(sweep, obligation), today, dueOn),
    provisional: obligation.provisional,
    consequence: consequence.say,
    firstAction: consequence.first ?? null,
    source: [source.document, source.section].filter(Boolean).join(', '),
    applicationUrl: siteUrl(
      applicationId ? routes.application(applicationId, 'clocks') : routes.due(),
    ),
    acknowledgeUrl: siteUrl(routes.acknowledge(secret)),
  })
}
