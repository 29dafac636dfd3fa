import {
  boolean,
  doublePrecision,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core'
import { sql } from 'drizzle-orm'
import type { Channel, FactBody, FactKind, Terms } from '@/lib/domain/clocks/facts'
import type { DerivationLine } from '@/lib/domain/clocks/derivation'
import type {
  Consequence,
  OwnerRole,
  RuleSource,
  StepKind,
  StepParty,
} from '@/lib/domain/clocks/procedure'
import type { Status } from '@/lib/domain/clocks/schedule-types'
import { civilDate, id, instant, minorUnits, recordedAt } from '@/db/columns'
import { organizations, procedureRevisions } from '@/db/schema/organizations'
import { people } from '@/db/schema/people'

/** Project companies that apply: names on deeds and letters of credit must match. */
export const entities = pgTable('entities', {
  id: id(),
  name: text().notNull().unique(),
  signatory: text(),
  noticeAddress: text(),
})

export const projects = pgTable('projects', {
  id: id(),
  name: text().notNull().unique(),
  town: text(),
  latitude: doublePrecision(),
  longitude: doublePrecision(),
  createdAt: recordedAt(),
})

export const studyGroups = pgTable('study_groups', {
  id: id(),
  organizationId: uuid()
    .notNull()
    .references(() => organizations.id),
  name: text().notNull(),
  lastSeq: integer().notNull().default(0),
})

export const applications = pgTable('applications', {
  id: id(),
  projectId: uuid()
    .notNull()
    .references(() => projects.id),
  entityId: uuid().references(() => entities.id),
  studyGroupId: uuid().references(() => studyGroups.id),
  lastSeq: integer().notNull().default(0),
  createdAt: recordedAt(),
  createdBy: uuid().references(() => people.id),
})

export const applicationOrganizations = pgTable(
  'application_organizations',
  {
    applicationId: uuid()
      .notNull()
      .references(() => applications.id),
    organizationId: uuid()
      .notNull()
      .references(() => organizations.id),
    role: text().$type<StepParty>().notNull(),
    desk: text(),
  },
  (table) => [primaryKey({ columns: [table.applicationId, table.role] })],
)

export const facts = pgTable(
  'facts',
  {
    id: uuid().primaryKey(),
    applicationId: uuid().references(() => applications.id),
    studyGroupId: uuid().references(() => studyGroups.id),
    seq: integer().notNull(),
    kind: text().$type<FactKind>().notNull(),
    step: text(),
    instance: integer().notNull().default(1),
    obligation: text(),
    sentOn: civilDate(),
    sentAt: instant(),
    receivedOn: civilDate(),
    receivedAt: instant(),
    dueOn: civilDate(),
    dueAt: instant(),
    channel: text().$type<Channel>(),
    outcome: text(),
    amountMinor: minorUnits(),
    body: jsonb().$type<FactBody>().notNull().default({}),
    replacesId: uuid().unique(),
    reason: text(),
    recordedAt: recordedAt(),
    recordedBy: uuid().references(() => people.id),
    /** person: typed by a person; job: made by the product. */
    trust: text().$type<'person' | 'job'>().notNull().default('person'),
    /** Hash of what the client sent, so that a second submit is known as the same fact. */
    inputSha256: text().notNull(),
  },
  (table) => [
    unique('facts_application_seq').on(table.applicationId, table.seq),
    unique('facts_group_seq').on(table.studyGroupId, table.seq),
  ],
)

/** Everything owed is one kind of thing; a projection, rewritten with each fact. */
export const obligations = pgTable(
  'obligations',
  {
    id: id(),
    subjectKind: text().$type<'application' | 'own'>().notNull(),
    subjectId: uuid().notNull(),
    step: text().notNull(),
    instance: integer().notNull(),
    /** Empty for the step itself. */
    obligation: text().notNull().default(''),
    applicationId: uuid().references(() => applications.id),
    title: text().notNull(),
    short: text(),
    stage: text().notNull(),
    party: text().$type<StepParty>().notNull(),
    kind: text().$type<StepKind>().notNull(),
    onLine: boolean().notNull(),
    ownerRole: text().$type<OwnerRole>(),
    consequence: jsonb().$type<Consequence>().notNull(),
    status: text().$type<Status>().notNull(),
    provisional: boolean().notNull(),
    outcome: text(),
    startOn: civilDate(),
    dueOn: civilDate(),
    dueAt: instant(),
    zone: text().notNull(),
    statedDueOn: civilDate(),
    startBy: civilDate(),
    doneOn: civilDate(),
    doneLate: boolean(),
    hourRecorded: boolean(),
    moneyTargetMinor: minorUnits(),
    moneyHeldMinor: minorUnits(),
    source: jsonb().$type<RuleSource>().notNull(),
    derivation: jsonb().$type<DerivationLine[]>().notNull(),
    position: integer().notNull(),
    atSeq: integer().notNull(),
  },
  (table) => [
    unique('obligations_key').on(
      table.subjectKind,
      table.subjectId,
      table.step,
      table.instance,
      table.obligation,
    ),
    index('obligations_open').on(table.status, table.dueOn),
    index('obligations_application').on(table.applicationId),
  ],
)

/** One row an application: terms and revision in force, for lists. A projection. */
export const applicationStates = pgTable('application_states', {
  applicationId: uuid()
    .primaryKey()
    .references(() => applications.id),
  terms: jsonb().$type<Terms>().notNull(),
  procedureRevisionId: uuid()
    .notNull()
    .references(() => procedureRevisions.id),
  standing: text().$type<'preparing' | 'filed' | 'in_operation' | 'withdrawn'>().notNull(),
  stage: text().notNull(),
  stranded: jsonb().$type<{ factId: string; reason: string }[]>().notNull(),
  atSeq: integer().notNull(),
})

export const assignments = pgTable(
  'assignments',
  {
    id: id(),
    applicationId: uuid()
      .notNull()
      .references(() => applications.id),
    /** `*` for the whole application. */
    step: text().notNull(),
    instance: integer().notNull().default(0),
    obligation: text().notNull().default(''),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    recordedAt: recordedAt(),
    recordedBy: uuid(),
  },
  (table) => [index('assignments_application').on(table.applicationId)],
)

export const acknowledgements = pgTable(
  'acknowledgements',
  {
    id: id(),
    applicationId: uuid()
      .notNull()
      .references(() => applications.id),
    step: text().notNull(),
    instance: integer().notNull(),
    obligation: text().notNull().default(''),
    dueOn: civilDate().notNull(),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    reason: text().notNull(),
    untilOn: civilDate(),
    recordedAt: recordedAt(),
  },
  (table) => [index('acknowledgements_key').on(table.applicationId, table.step, table.instance)],
)

/** The outbox: one row a notice, unique by what it is about, so nothing is sent twice. */
export const notices = pgTable(
  'notices',
  {
    id: id(),
    subjectKind: text().$type<'obligation' | 'person' | 'exhibit'>().notNull(),
    subjectKey: text().notNull(),
    applicationId: uuid().references(() => applications.id),
    dueOn: text().notNull().default(''),
    rung: text().notNull(),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    channel: text().$type<'email'>().notNull().default('email'),
    to: text().notNull(),
    body: jsonb().$type<{ subject: string; html: string; text: string }>().notNull(),
    attempts: integer().notNull().default(0),
    nextAttemptAt: instant().notNull(),
    leaseUntil: instant(),
    messageId: text().notNull(),
    acceptedAt: instant(),
    /** Why the last attempt failed, in words; kept while it is tried again. */
    failed: text(),
    /** Set where the address was refused for good: nothing more is tried. */
    refusedAt: instant(),
    createdAt: recordedAt(),
    /** SHA-256 of the secret in the acknowledge link; the link opens a page that posts. */
    ackSecretHash: text().unique(),
  },
  (table) => [
    unique('notices_key').on(
      table.subjectKind,
      table.subjectKey,
      table.dueOn,
      table.rung,
      table.personId,
      table.channel,
    ),
    index('notices_waiting')
      .on(table.nextAttemptAt)
      .where(sql`accepted_at is null and refused_at is null`),
  ],
)
