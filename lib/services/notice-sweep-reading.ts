import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import {
  acknowledgements,
  applicationOrganizations,
  applications,
  applicationStates,
  assignments,
  notices,
  obligations,
  projects,
} from '@/db/schema/applications'
import { calendarRevisions, calendars, organizations } from '@/db/schema/organizations'
import { people } from '@/db/schema/people'
import { businessCalendar, type BusinessCalendar } from '@/lib/domain/clocks/calendar'
import { federalCalendar } from '@/lib/domain/clocks/library-calendars'
import type { Role } from '@/lib/domain/access'
import { obligationKey, sayDue, workingDue } from '@/lib/domain/obligations'
import { log } from '@/lib/services/log'

export interface SweepPerson {
  id: string
  name: string
  email: string
  roles: Role[]
  zone: string
}

type OpenRow = Awaited<ReturnType<typeof readOpen>>[number]
/** An open obligation with a due date, and what it belongs to. */
export type OpenObligation = Omit<OpenRow, 'dueOn' | 'dueAt'> & {
  dueOn: string
  /** ISO instant. */
  dueAt: string | null
}

/** Everything a sweep looks at, read in one transaction. */
export interface Sweep {
  obligations: OpenObligation[]
  people: ReadonlyMap<string, SweepPerson>
  calendars: ReadonlyMap<string, BusinessCalendar>
  /** By `application/role`. */
  organizations: ReadonlyMap<string, { name: string; calendarId: string }>
  /** Person by `application/step/instance/obligation`; the latest assignment. */
  assigned: ReadonlyMap<string, string>
  /** Next date by `key@due date`; the latest acknowledgment. */
  acknowledgedUntil: ReadonlyMap<string, string>
  /** `key|due date|rung|person` of what the outbox holds. */
  queued: ReadonlySet<string>
}

/** Reads what is open, who hears of it, whose days count and what the outbox holds already. */
export async function readSweep(tx: Tx): Promise<Sweep> {
  const open = withoutCovered((await readOpen(tx)).flatMap(datedOf))
  return {
    obligations: open,
    people: await readPeople(tx),
    calendars: await readCalendars(tx),
    organizations: await readOrganizations(tx),
    assigned: await readAssigned(tx),
    acknowledgedUntil: await readAcknowledged(tx),
    queued: await readQueued(tx, open),
  }
}

function readOpen(tx: Tx) {
  return tx
    .select({
      subjectKind: obligations.subjectKind,
      subjectId: obligations.subjectId,
      step: obligations.step,
      instance: obligations.instance,
      obligation: obligations.obligation,
      applicationId: obligations.applicationId,
      title: obligations.title,
      party: obligations.party,
      ownerRole: obligations.ownerRole,
      consequence: obligations.consequence,
      provisional: obligations.provisional,
      startOn: obligations.startOn,
      startBy: obligations.startBy,
      dueOn: obligations.dueOn,
      dueAt: obligations.dueAt,
      statedDueOn: obligations.statedDueOn,
      zone: obligations.zone,
      source: obligations.source,
      projectName: projects.name,
      requestNo: sql<string | null>`${applicationStates.terms} ->> 'requestNo'`,
    })
    .from(obligations)
    .leftJoin(applications, eq(applications.id, obligations.applicationId))
    .leftJoin(projects, eq(projects.id, applications.projectId))
    .leftJoin(applicationStates, eq(applicationStates.applicationId, obligations.applicationId))
    .where(eq(obligations.status, 'open'))
}

/** One obligation that cannot be read must not silence all others. */
function datedOf(row: OpenRow): OpenObligation[] {
  try {
    const due = workingDue({ ...row, dueAt: row.dueAt?.toISOString() ?? null })
    if (due) sayDue({ ...due, zone: row.zone })
    return due ? [{ ...row, ...due }] : []
  } catch (error) {
    log.error({ error, obligation: obligationKey(row) }, 'no notice can be made')
    return []
  }
}

/** A step whose own obligations are open is told by them; both would say the same thing twice. */
function withoutCovered(open: OpenObligation[]): OpenObligation[] {
  const stepOf = (one: OpenObligation) => obligationKey({ ...one, obligation: '' })
  const covered = new Set(open.filter((one) => one.obligation !== '').map(stepOf))
  return open.filter((one) => one.obligation !== '' || !covered.has(stepOf(one)))
}

async function readPeople(tx: Tx) {
  const rows = await tx
    .select({
      id: people.id,
      name: people.name,
      email: people.email,
      zone: people.zone,
      roles: sql<Role[]>`array(
        select held.role from person_roles held where held.person_id = ${people.id}
      )`,
    })
    .from(people)
    .where(eq(people.active, true))
    .orderBy(asc(people.name), asc(people.id))
  return new Map(rows.map((row) => [row.id, row]))
}

async function readCalendars(tx: Tx) {
  const rows = await tx
    .selectDistinctOn([calendarRevisions.calendarId], {
      id: calendarRevisions.calendarId,
      name: calendars.name,
      rules: calendarRevisions.rules,
    })
    .from(calendarRevisions)
    .innerJoin(calendars, eq(calendars.id, calendarRevisions.calendarId))
    .orderBy(calendarRevisions.calendarId, desc(calendarRevisions.no))
  return new Map(rows.map(({ id, name, rules }) => [id, businessCalendar(name, rules)]))
}

async function readOrganizations(tx: Tx) {
  const rows = await tx
    .select({
      applicationId: applicationOrganizations.applicationId,
      role: applicationOrganizations.role,
      name: organizations.shortName,
      calendarId: organizations.calendarId,
    })
    .from(applicationOrganizations)
    .innerJoin(organizations, eq(organizations.id, applicationOrganizations.organizationId))
  return new Map(rows.map((row) => [`${row.applicationId}/${row.role}`, row]))
}

async function readAssigned(tx: Tx) {
  const rows = await tx
    .select()
    .from(assignments)
    .orderBy(asc(assignments.recordedAt), asc(assignments.id))
  return new Map(
    rows.map((row) => [
      [row.applicationId, row.step, row.instance, row.obligation].join('/'),
      row.personId,
    ]),
  )
}

async function readAcknowledged(tx: Tx) {
  const rows = await tx
    .select()
    .from(acknowledgements)
    .orderBy(asc(acknowledgements.recordedAt), asc(acknowledgements.id))
  return new Map(
    rows.flatMap((row) => {
      const of = { ...row, subjectKind: 'application', subjectId: row.applicationId }
      return row.untilOn ? [[`${obligationKey(of)}@${row.dueOn}`, row.untilOn] as const] : []
    }),
  )
}

async function readQueued(tx: Tx, open: OpenObligation[]): Promise<Set<string>> {
  if (open.length === 0) return new Set()
  const rows = await tx
    .select({
      key: notices.subjectKey,
      dueOn: notices.dueOn,
      rung: notices.rung,
      personId: notices.personId,
    })
    .from(notices)
    .where(
      and(
        eq(notices.subjectKind, 'obligation'),
        inArray(notices.subjectKey, open.map(obligationKey)),
      ),
    )
  return new Set(rows.map((row) => [row.key, row.dueOn, row.rung, row.personId].join('|')))
}

/** Whose business days count: the owing organization's, else the operator's, else federal ones. */
export function calendarOf(
  sweep: Sweep,
  { applicationId, party }: OpenObligation,
): BusinessCalendar {
  const own = sweep.organizations.get(`${applicationId}/${party}`)
  const operator = sweep.organizations.get(`${applicationId}/operator`)
  const calendarId = (own ?? operator)?.calendarId
  return (calendarId && sweep.calendars.get(calendarId)) || federalCalendar
}

/** The nearest assignment counts: of the obligation, of its step, of the application. */
export function assignedTo(sweep: Sweep, of: OpenObligation): string | null {
  const nearest = [
    `${of.applicationId}/${of.step}/${of.instance}/${of.obligation}`,
    `${of.applicationId}/${of.step}/${of.instance}/`,
    `${of.applicationId}/${of.step}/0/`,
    `${of.applicationId}/*/0/`,
  ]
  return nearest.map((key) => sweep.assigned.get(key)).find((id) => id !== undefined) ?? null
}

/** The next date an acknowledgment of this very due date names, or null. */
export function silentUntil(sweep: Sweep, of: OpenObligation): string | null {
  return sweep.acknowledgedUntil.get(`${obligationKey(of)}@${of.dueOn}`) ?? null
}
