import { randomUUID } from 'node:crypto'
import { and, eq, isNull, sql } from 'drizzle-orm'
import { notices } from '@/db/schema/applications'
import type { DemoPerson } from '@/db/demo/organizations'
import type { Db } from '@/db/client'
import type { Context } from '@/lib/services/context'
import { checkExhibit, issueExhibit, prepareExhibit } from '@/lib/services/exhibits'
import { makeDocument } from '@/lib/worker/render-exhibit'

export interface ExhibitSeed {
  db: Db
  now: Date
  /** The context of the person who would have done it, at an instant. */
  personAt: (who: DemoPerson, at: Date) => Context
  /** Application by the project's name; a name that is absent is left out. */
  places: ReadonlyMap<string, { applicationId: string }>
}

interface DemoRevision {
  calculationNo: number
  what: string
  preparedDaysAgo: number
  checkedDaysAgo?: number
  issuedDaysAgo?: number
}

const reason = 'application estimate; no station file within 40 km'
const notes = 'Against the design revision, the data sheets and the terms of the request.'

/** Revisions of exhibit C by project, after the design revisions of db/demo/designs.ts. */
const demoExhibits: Record<string, DemoRevision[]> = {
  'Juniper Flat': [
    {
      calculationNo: 3,
      what: 'First issue, with the request',
      preparedDaysAgo: 203,
      checkedDaysAgo: 201,
      issuedDaysAgo: 200,
    },
    {
      calculationNo: 4,
      what: 'Inverters of 4.2 MVA, so that 0.95 at the POI is held at full export',
      preparedDaysAgo: 4,
      checkedDaysAgo: 1,
    },
  ],
  'Mesa Larga': [
    {
      calculationNo: 1,
      what: 'First issue, with the request',
      preparedDaysAgo: 407,
      checkedDaysAgo: 406,
      issuedDaysAgo: 405,
    },
    {
      calculationNo: 1,
      what: 'Name of the bus at the POI',
      preparedDaysAgo: 160,
      checkedDaysAgo: 158,
    },
  ],
  'Cold Spring Road': [
    {
      calculationNo: 1,
      what: 'First issue, with the request',
      preparedDaysAgo: 73,
      checkedDaysAgo: 72,
      issuedDaysAgo: 72,
    },
  ],
  'Goshawk Prairie': [
    { calculationNo: 1, what: 'Solar part, storage left out', preparedDaysAgo: 15 },
  ],
}

/**
 * Revisions of exhibit C through the services a person uses, each document made by the function
 * that the worker calls. Run after the designs and their calculations.
 */
export async function seedExhibits(seed: ExhibitSeed): Promise<void> {
  for (const [project, revisions] of Object.entries(demoExhibits)) {
    const place = seed.places.get(project)
    if (!place) continue
    for (const revision of revisions) await playRevision(seed, place.applicationId, revision)
  }
  await settlePast(seed.db)
}

async function playRevision(
  { now, personAt }: ExhibitSeed,
  applicationId: string,
  revision: DemoRevision,
): Promise<void> {
  const { calculationNo, what, preparedDaysAgo, checkedDaysAgo, issuedDaysAgo } = revision
  const at = (daysAgo: number) => new Date(now.getTime() - daysAgo * 86_400_000)
  const making = (daysAgo: number): Context => ({
    ...personAt('engineer', at(daysAgo)),
    actor: { kind: 'job', name: 'demo' },
  })
  const { id } = await prepareExhibit(personAt('engineer', at(preparedDaysAgo)), applicationId, {
    id: randomUUID(),
    calculationNo,
    what,
    weatherReason: reason,
  })
  await makeDocument(making(preparedDaysAgo), id)
  if (checkedDaysAgo === undefined) return
  await checkExhibit(personAt('engineer2', at(checkedDaysAgo)), id, { notes })
  await makeDocument(making(checkedDaysAgo), id)
  if (issuedDaysAgo !== undefined) await issueExhibit(personAt('developer', at(issuedDaysAgo)), id)
}

/** What the past asked for was made and sent then: no worker and no mail follows it up today. */
async function settlePast(db: Db): Promise<void> {
  await db
    .update(notices)
    .set({ acceptedAt: sql`${notices.createdAt}` })
    .where(and(eq(notices.subjectKind, 'exhibit'), isNull(notices.acceptedAt)))
  await db.execute(sql`
    select graphile_worker.complete_jobs(array_agg(id))
    from graphile_worker._private_jobs where key like 'renderExhibit:%'`)
}
