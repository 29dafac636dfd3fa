import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { getDb } from '@/db/client'
import { applicationOrganizations, applications, facts, projects } from '@/db/schema/applications'
import {
  calendarRevisions,
  calendars,
  organizations,
  procedureRevisions,
  procedures,
} from '@/db/schema/organizations'
import type { ProcedureBody, Step } from '@/lib/domain/clocks/procedure'
import { rewriteProjection } from '@/lib/services/projection'

const step = (key: string, title: string, more: Partial<Step>): Step => ({
  key,
  title,
  stage: 'Request',
  party: 'operator',
  kind: 'normal',
  clocks: [],
  outcomes: [{ key: 'done', title: 'Done' }],
  onMiss: { effect: 'duty', say: 'They are reminded.' },
  source: { document: 'Invented procedure', section: '1', basis: 'from_memory' },
  ...more,
})

/** Filed by us, determined complete or deficient by the utility; invented for tests. */
export const shortProcedure: ProcedureBody = {
  key: 'short',
  title: 'Short procedure',
  stages: ['Request'],
  filedStep: 'filed',
  loops: [],
  steps: [
    step('filed', 'File the request', { party: 'applicant' }),
    step('determined', 'Completeness determination', {
      start: { mode: 'all', of: [{ step: 'filed' }] },
      clocks: [{ length: 10, unit: 'business_day' }],
      outcomes: [
        { key: 'complete', title: 'Complete' },
        { key: 'deficient', title: 'Deficient' },
      ],
    }),
  ],
}

export interface BareApplication {
  id: string
  organizationId: string
}

/** An organization whose applications count by the short procedure, in US Mountain time. */
export async function createBareUtility(): Promise<{ organizationId: string; revisionId: string }> {
  const db = getDb()
  const key = randomUUID()
  const [calendar] = await db.insert(calendars).values({ key, name: key }).returning()
  const calendarId = calendar?.id ?? ''
  const rules = { weekend: [0, 6], holidays: [], closures: [], source: 'invented' }
  await db.insert(calendarRevisions).values({ calendarId, no: 1, rules })
  const [organization] = await db
    .insert(organizations)
    .values({
      name: `Utility ${key}`,
      shortName: 'Utility',
      kind: 'utility',
      zone: 'America/Denver',
      closesAt: '17:00',
      receiptRule: 'as_is',
      calendarId,
    })
    .returning()
  const [procedure] = await db.insert(procedures).values({ key, title: 'Short' }).returning()
  const [revision] = await db
    .insert(procedureRevisions)
    .values({ procedureId: procedure?.id ?? '', no: 1, body: shortProcedure, sha256: key })
    .returning()
  return { organizationId: organization?.id ?? '', revisionId: revision?.id ?? '' }
}

/** A draft application: rows as the services keep them, with no person behind them. */
export async function createBareApplication(utility: {
  organizationId: string
  revisionId: string
}): Promise<BareApplication> {
  const { organizationId, revisionId } = utility
  return getDb().transaction(async (tx) => {
    const name = `Project ${randomUUID()}`
    const [project] = await tx.insert(projects).values({ name }).returning()
    const [application] = await tx
      .insert(applications)
      .values({ projectId: project?.id ?? '' })
      .returning()
    const id = application?.id ?? ''
    await tx
      .insert(applicationOrganizations)
      .values({ applicationId: id, organizationId, role: 'operator' })
    await tx.insert(facts).values({
      id: randomUUID(),
      applicationId: id,
      seq: 1,
      kind: 'changed',
      body: { procedureRevisionId: revisionId },
      inputSha256: 'none',
    })
    await tx.update(applications).set({ lastSeq: 1 }).where(eq(applications.id, id))
    await rewriteProjection(tx, id, 1)
    return { id, organizationId }
  })
}
