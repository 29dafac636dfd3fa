import { getDb } from '@/db/client'
import {
  applicationOrganizations,
  applications,
  obligations,
  projects,
} from '@/db/schema/applications'
import { calendarRevisions, calendars, organizations } from '@/db/schema/organizations'
import { federalRules } from '@/lib/domain/clocks/library-calendars'

let made = 0

/** An application of an invented utility, without a procedure. @returns its id */
export async function createBareApplication(): Promise<string> {
  const db = getDb()
  const no = (made += 1)
  const [calendar] = await db
    .insert(calendars)
    .values({ key: `calendar-${no}`, name: `Calendar ${no}` })
    .returning()
  await db
    .insert(calendarRevisions)
    .values({ calendarId: calendar!.id, no: 1, rules: federalRules })
  const [utility] = await db
    .insert(organizations)
    .values({
      name: `Invented Power & Light ${no}`,
      shortName: `Invented P&L ${no}`,
      kind: 'utility',
      zone: 'America/Denver',
      closesAt: '17:00',
      receiptRule: 'as_is',
      calendarId: calendar!.id,
    })
    .returning()
  const [project] = await db
    .insert(projects)
    .values({ name: `Project ${no}` })
    .returning()
  const [application] = await db.insert(applications).values({ projectId: project!.id }).returning()
  const applicationId = application!.id
  await db
    .insert(applicationOrganizations)
    .values({ applicationId, organizationId: utility!.id, role: 'operator' })
  return applicationId
}

type NewObligation = typeof obligations.$inferInsert

/** An open clock of ours that can lose the request: due Thu 10 Dec 2026, 5 pm in Denver. */
export async function createOpenObligation(change: Partial<NewObligation> = {}) {
  const applicationId = change.applicationId ?? (await createBareApplication())
  const row: NewObligation = {
    subjectKind: 'application',
    subjectId: applicationId,
    applicationId,
    step: 'cure',
    instance: 1,
    title: 'Cure the deficiency',
    stage: 'Application',
    party: 'applicant',
    kind: 'normal',
    onLine: true,
    ownerRole: 'developer',
    consequence: {
      effect: 'withdrawn',
      say: 'The request is withdrawn and loses its queue position.',
      first: 'Send what the deficiency letter names.',
    },
    status: 'open',
    provisional: false,
    startOn: '2026-11-25',
    dueOn: '2026-12-10',
    dueAt: new Date('2026-12-11T00:00:00Z'),
    zone: 'America/Denver',
    source: { document: 'Invented procedure', section: '1.2', basis: 'adapted' },
    derivation: [],
    position: 1,
    atSeq: 1,
    ...change,
  }
  const [obligation] = await getDb().insert(obligations).values(row).returning()
  return obligation!
}
