import {
  bigint,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core'
import type { Channel } from '@/lib/domain/clocks/facts'
import { civilDate, id, instant, recordedAt } from '@/db/columns'
import { applications, facts } from '@/db/schema/applications'
import { organizations } from '@/db/schema/organizations'
import { people } from '@/db/schema/people'

/** A file by content: the same bytes are kept once. */
export const files = pgTable('files', {
  sha256: text().primaryKey(),
  size: bigint({ mode: 'number' }).notNull(),
  /** By content, never by name. */
  type: text().notNull(),
  createdAt: recordedAt(),
})

/** A file's place: what it belongs to, and under which name. */
export const fileLinks = pgTable(
  'file_links',
  {
    id: id(),
    subjectKind: text()
      .$type<'entry' | 'application' | 'project' | 'exhibit' | 'weather'>()
      .notNull(),
    subjectId: uuid().notNull(),
    sha256: text()
      .notNull()
      .references(() => files.sha256),
    name: text().notNull(),
    restrictedTo: uuid().array(),
    recordedAt: recordedAt(),
    recordedBy: uuid().references(() => people.id),
  },
  (table) => [index('file_links_subject').on(table.subjectKind, table.subjectId)],
)

export const entries = pgTable('entries', {
  id: uuid().primaryKey(),
  revisesId: uuid().unique(),
  at: instant().notNull(),
  zone: text().notNull(),
  channel: text().$type<Channel>().notNull(),
  direction: text().$type<'in' | 'out'>().notNull(),
  visibility: text().$type<'internal' | 'shareable'>().notNull(),
  organizationId: uuid().references(() => organizations.id),
  parties: text().notNull(),
  subject: text().notNull(),
  text: text().notNull(),
  messageId: text().unique(),
  replyOwedBy: text().$type<'us' | 'them'>(),
  replyOwedOn: civilDate(),
  /** First revision of the entry that this one answers; settles the reply owed there. */
  answersId: uuid(),
  /** Hash of what the client sent, so that a second submit is known as the same entry. */
  inputSha256: text().notNull(),
  recordedAt: recordedAt(),
  recordedBy: uuid().references(() => people.id),
})

export const entryApplications = pgTable(
  'entry_applications',
  {
    entryId: uuid()
      .notNull()
      .references(() => entries.id),
    applicationId: uuid()
      .notNull()
      .references(() => applications.id),
    step: text(),
    instance: integer(),
  },
  (table) => [
    primaryKey({ columns: [table.entryId, table.applicationId] }),
    index('entry_applications_app').on(table.applicationId),
  ],
)

export const factEvidence = pgTable(
  'fact_evidence',
  {
    id: id(),
    factId: uuid()
      .notNull()
      .references(() => facts.id),
    entryId: uuid().references(() => entries.id),
    fileSha256: text().references(() => files.sha256),
    exhibitRevisionId: uuid(),
    recordedAt: recordedAt(),
  },
  (table) => [
    unique()
      .on(table.factId, table.entryId, table.fileSha256, table.exhibitRevisionId)
      .nullsNotDistinct(),
    index('fact_evidence_fact').on(table.factId),
  ],
)
