import { integer, jsonb, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core'
import { id, instant, recordedAt } from '@/db/columns'
import { applications, facts, projects } from '@/db/schema/applications'
import { files } from '@/db/schema/correspondence'
import { people } from '@/db/schema/people'

export const weather = pgTable('weather', {
  id: id(),
  sha256: text()
    .notNull()
    .unique()
    .references(() => files.sha256),
  kind: text().$type<'tmy3' | 'epw' | 'synthetic'>().notNull(),
  name: text().notNull(),
  meta: jsonb().notNull(),
  report: jsonb().notNull(),
  recordedAt: recordedAt(),
  recordedBy: uuid().references(() => people.id),
})

export const designs = pgTable('designs', {
  id: id(),
  projectId: uuid()
    .notNull()
    .unique()
    .references(() => projects.id),
  lastNo: integer().notNull().default(0),
})

export const designRevisions = pgTable(
  'design_revisions',
  {
    id: id(),
    designId: uuid()
      .notNull()
      .references(() => designs.id),
    no: integer().notNull(),
    /** The plant as designed; lib/schemas/design.ts states the shape. */
    body: jsonb().notNull(),
    /** Protection and metering, filled by later exhibits. */
    protection: jsonb().notNull().default({}),
    metering: jsonb().notNull().default({}),
    weatherId: uuid().references(() => weather.id),
    note: text(),
    recordedAt: recordedAt(),
    recordedBy: uuid().references(() => people.id),
  },
  (table) => [unique().on(table.designId, table.no)],
)

export const calculations = pgTable(
  'calculations',
  {
    id: uuid().primaryKey(),
    applicationId: uuid()
      .notNull()
      .references(() => applications.id),
    no: integer().notNull(),
    designRevisionId: uuid()
      .notNull()
      .references(() => designRevisions.id),
    termsFactId: uuid().references(() => facts.id),
    weatherId: uuid()
      .notNull()
      .references(() => weather.id),
    inputs: jsonb().notNull(),
    result: jsonb().notNull(),
    engineVersion: text().notNull(),
    sha256: text().notNull(),
    recordedAt: recordedAt(),
    recordedBy: uuid().references(() => people.id),
  },
  (table) => [unique().on(table.applicationId, table.no)],
)

export const exhibits = pgTable(
  'exhibits',
  {
    id: id(),
    applicationId: uuid()
      .notNull()
      .references(() => applications.id),
    letter: text().notNull(),
    lastNo: integer().notNull().default(0),
  },
  (table) => [unique().on(table.applicationId, table.letter)],
)

/** Frozen by trigger once issued. */
export const exhibitRevisions = pgTable(
  'exhibit_revisions',
  {
    id: id(),
    exhibitId: uuid()
      .notNull()
      .references(() => exhibits.id),
    no: integer().notNull(),
    state: text().$type<'draft' | 'checked' | 'issued' | 'superseded'>().notNull(),
    calculationId: uuid().references(() => calculations.id),
    designRevisionId: uuid().references(() => designRevisions.id),
    data: jsonb().notNull(),
    fileSha256: text().references(() => files.sha256),
    sealedFileSha256: text().references(() => files.sha256),
    note: text(),
    render: text().$type<'waiting' | 'done' | 'failed'>().notNull().default('waiting'),
    renderError: text(),
    preparedBy: uuid()
      .notNull()
      .references(() => people.id),
    preparedAt: instant().notNull(),
    checkedBy: uuid().references(() => people.id),
    checkedAt: instant(),
    issuedBy: uuid().references(() => people.id),
    issuedAt: instant(),
  },
  (table) => [unique().on(table.exhibitId, table.no)],
)
