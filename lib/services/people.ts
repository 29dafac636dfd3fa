import { and, asc, eq, isNotNull, ne, sql } from 'drizzle-orm'
import type { Tx } from '@/db/client'
import { people, personRoles } from '@/db/schema/people'
import type { Role } from '@/lib/domain/access'
import { uuid } from '@/lib/schemas/common'
import type { InvitationInput, Person, PersonChange } from '@/lib/schemas/person'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { invalid, notFound, ServiceError } from '@/lib/services/errors'
import { sendInvitation } from '@/lib/services/one-time-links'
import { hashPassword } from '@/lib/services/passwords'

// Raw "people.id": the builder leaves the table out, and inside a subquery that names another column.
const columns = {
  id: people.id,
  name: people.name,
  email: people.email,
  zone: people.zone,
  active: people.active,
  hasPassword: sql<boolean>`${people.passwordHash} is not null`,
  roles: sql<Role[]>`array(
    select held.role from person_roles held where held.person_id = people.id order by held.role
  )`,
  lastSignInAt: sql<string | null>`(
    select max(seen.at) from audit seen
    where seen.subject_kind = 'person' and seen.subject_id = people.id::text
      and seen.action = 'session.start'
  )`,
}

/** Everybody of the company, by name. */
export async function listPeople(ctx: Context): Promise<{ items: Person[] }> {
  authorize(ctx, 'person.read')
  const rows = await ctx.db.select(columns).from(people).orderBy(asc(people.name), asc(people.id))
  return { items: rows.map(personOfRow) }
}

/** One person. @throws ServiceError `not_found` */
export async function getPerson(ctx: Context, id: string): Promise<Person> {
  authorize(ctx, 'person.read')
  return readPerson(ctx.db, id)
}

/**
 * Adds a person and queues the invitation by e-mail. The client's id makes a second submit the same
 * invitation.
 * @throws ServiceError `invalid` where the address belongs to somebody else
 */
export async function invitePerson(ctx: Context, input: InvitationInput): Promise<Person> {
  authorize(ctx, 'person.write')
  return ctx.db.transaction(async (tx) => {
    const isNew = await insertPerson(ctx, tx, input, null)
    if (isNew) await sendInvitation(ctx, tx, input)
    return readPerson(tx, input.id)
  })
}

/** Sends a new invitation; the link of the one before stops working. */
export async function resendInvitation(ctx: Context, id: string): Promise<Person> {
  authorize(ctx, 'person.write')
  return ctx.db.transaction(async (tx) => {
    await lockPeople(tx)
    const person = await readPerson(tx, id)
    if (person.standing !== 'invited') {
      throw new ServiceError('conflict', `${person.name} is not waiting for an invitation.`)
    }
    await sendInvitation(ctx, tx, person)
    await recordAudit(ctx, tx, { action: 'person.invite_again', ...subject(id) })
    return person
  })
}

export interface PersonWithPassword extends Omit<InvitationInput, 'id'> {
  id?: string
  password: string
}

/** Adds a person who has a password already, or leaves the one with this address as it is. */
export async function createPersonWithPassword(
  ctx: Context,
  { password, ...input }: PersonWithPassword,
): Promise<{ id: string }> {
  authorize(ctx, 'person.write')
  const passwordHash = await hashPassword(password)
  return ctx.db.transaction(async (tx) => {
    const email = input.email.trim().toLowerCase()
    const [kept] = await tx.select({ id: people.id }).from(people).where(eq(people.email, email))
    if (kept) return kept
    const id = input.id ?? crypto.randomUUID()
    await insertPerson(ctx, tx, { ...input, id, email }, passwordHash)
    return { id }
  })
}

/**
 * Changes name, zone, roles, or whether the person may sign in. Disabling ends the person's
 * sessions and tokens at the next request.
 * @throws ServiceError `not_found`; `conflict` for oneself or the last administrator
 */
export async function changePerson(
  ctx: Context,
  id: string,
  change: PersonChange,
): Promise<Person> {
  authorize(ctx, 'person.write')
  return ctx.db.transaction(async (tx) => {
    await lockPeople(tx)
    const before = await readPerson(tx, id)
    await refuseLockOut(ctx, tx, before, change)
    await writeChange(tx, id, change)
    await recordAudit(ctx, tx, {
      action: 'person.change',
      ...subject(id),
      before: keptOf(before),
      after: change,
    })
    return readPerson(tx, id)
  })
}

async function refuseLockOut(
  ctx: Context,
  tx: Tx,
  before: Person,
  change: PersonChange,
): Promise<void> {
  const isSelf = actorId(ctx) === before.id
  if (isSelf && change.active === false) {
    throw new ServiceError(
      'conflict',
      'You cannot disable yourself. Ask another administrator to do it.',
    )
  }
  const losesRole = change.roles !== undefined && !change.roles.includes('administrator')
  const isAdministrator = before.roles.includes('administrator') && before.standing === 'active'
  if (!isAdministrator || !(losesRole || change.active === false)) return
  if (await hasOtherAdministrator(tx, before.id)) return
  throw new ServiceError(
    'conflict',
    `${before.name} is the last administrator who can sign in. Make another person administrator first.`,
  )
}

async function hasOtherAdministrator(tx: Tx, id: string): Promise<boolean> {
  const rows = await tx
    .select({ id: people.id })
    .from(people)
    .innerJoin(personRoles, eq(personRoles.personId, people.id))
    .where(
      and(
        eq(personRoles.role, 'administrator'),
        eq(people.active, true),
        isNotNull(people.passwordHash),
        ne(people.id, id),
      ),
    )
    .limit(1)
  return rows.length > 0
}

async function writeChange(tx: Tx, id: string, change: PersonChange): Promise<void> {
  const { roles, ...fields } = change
  if (Object.keys(fields).length > 0) {
    const ends = fields.active === false
    const version = ends ? { sessionVersion: sql`${people.sessionVersion} + 1` } : {}
    await tx
      .update(people)
      .set({ ...fields, ...version })
      .where(eq(people.id, id))
  }
  if (!roles) return
  await tx.delete(personRoles).where(eq(personRoles.personId, id))
  await tx.insert(personRoles).values(roles.map((role) => ({ personId: id, role })))
}

/** Adds the row with its roles; false where this very person is there already. */
async function insertPerson(
  ctx: Context,
  tx: Tx,
  { id, roles, ...fields }: InvitationInput,
  passwordHash: string | null,
): Promise<boolean> {
  const added = await tx
    .insert(people)
    .values({ id, ...fields, passwordHash, createdAt: ctx.now })
    .onConflictDoNothing()
    .returning({ id: people.id })
  if (added.length === 0) {
    await refuseOtherPerson(tx, id, fields.email)
    return false
  }
  await tx.insert(personRoles).values(roles.map((role) => ({ personId: id, role })))
  await recordAudit(ctx, tx, { action: 'person.add', ...subject(id), after: { ...fields, roles } })
  return true
}

async function refuseOtherPerson(tx: Tx, id: string, email: string): Promise<void> {
  const [kept] = await tx.select({ id: people.id }).from(people).where(eq(people.email, email))
  if (kept?.id === id) return
  throw invalid([{ path: 'email', message: `${email} belongs to a person who is here already.` }])
}

async function readPerson(db: Pick<Tx, 'select'>, id: string): Promise<Person> {
  if (!uuid.safeParse(id).success) throw notFound('person')
  const [row] = await db.select(columns).from(people).where(eq(people.id, id))
  if (!row) throw notFound('person')
  return personOfRow(row)
}

// One at a time, so that two administrators cannot disable each other in the same moment.
async function lockPeople(tx: Tx): Promise<void> {
  await tx.execute(sql`select pg_advisory_xact_lock(hashtext('people'))`)
}

interface PersonRow extends Omit<Person, 'standing'> {
  active: boolean
  hasPassword: boolean
}

function personOfRow({ active, hasPassword, lastSignInAt, ...row }: PersonRow): Person {
  const standing = !active ? 'disabled' : hasPassword ? 'active' : 'invited'
  return { ...row, standing, lastSignInAt: lastSignInAt && new Date(lastSignInAt).toISOString() }
}

const subject = (id: string) => ({ subjectKind: 'person', subjectId: id })

const keptOf = ({ name, zone, roles, standing }: Person) => ({ name, zone, roles, standing })
