import {
  boolean,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core'
import type { Role } from '@/lib/domain/access'
import { id, instant, recordedAt } from '@/db/columns'

export const people = pgTable('people', {
  id: id(),
  email: text().notNull().unique(),
  name: text().notNull(),
  zone: text().notNull(),
  passwordHash: text(),
  active: boolean().notNull().default(true),
  sessionVersion: integer().notNull().default(1),
  calendarSecretHash: text().unique(),
  createdAt: recordedAt(),
})

export const personRoles = pgTable(
  'person_roles',
  {
    personId: uuid()
      .notNull()
      .references(() => people.id),
    role: text().$type<Role>().notNull(),
  },
  (table) => [primaryKey({ columns: [table.personId, table.role] })],
)

/** One-time links (invitation, reset): only the hash of the secret is kept. */
export const oneTimeTokens = pgTable('one_time_tokens', {
  hash: text().primaryKey(),
  purpose: text().$type<'invitation' | 'reset'>().notNull(),
  personId: uuid()
    .notNull()
    .references(() => people.id),
  expiresAt: instant().notNull(),
  usedAt: instant(),
  createdAt: recordedAt(),
})

export const apiTokens = pgTable('api_tokens', {
  hash: text().primaryKey(),
  id: uuid().notNull().unique().defaultRandom(),
  personId: uuid()
    .notNull()
    .references(() => people.id),
  name: text().notNull(),
  createdAt: recordedAt(),
  lastUsedAt: instant(),
  revokedAt: instant(),
})

/** Failed and counted attempts, by key (an address or a network address) and window. */
export const attempts = pgTable('attempts', {
  key: text().primaryKey(),
  count: integer().notNull(),
  windowStartsAt: instant().notNull(),
  blockedUntil: instant(),
})

export const audit = pgTable(
  'audit',
  {
    id: id(),
    at: recordedAt(),
    requestId: text().notNull(),
    actorId: uuid(),
    actorName: text().notNull(),
    action: text().notNull(),
    subjectKind: text().notNull(),
    subjectId: text().notNull(),
    before: jsonb(),
    after: jsonb(),
  },
  (table) => [index('audit_subject').on(table.subjectKind, table.subjectId)],
)
