import { integer, jsonb, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core'
import type { CalendarRules } from '@/lib/domain/clocks/calendar'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'
import { id, recordedAt } from '@/db/columns'

export const calendars = pgTable('calendars', {
  id: id(),
  key: text().notNull().unique(),
  name: text().notNull(),
})

export const calendarRevisions = pgTable(
  'calendar_revisions',
  {
    id: id(),
    calendarId: uuid()
      .notNull()
      .references(() => calendars.id),
    no: integer().notNull(),
    rules: jsonb().$type<CalendarRules>().notNull(),
    recordedAt: recordedAt(),
    recordedBy: uuid(),
  },
  (table) => [unique().on(table.calendarId, table.no)],
)

export const organizations = pgTable('organizations', {
  id: id(),
  name: text().notNull().unique(),
  shortName: text().notNull(),
  kind: text().notNull(),
  zone: text().notNull(),
  /** Local hour `HH:MM`; null: to the end of the day. */
  closesAt: text(),
  receiptRule: text().$type<'as_is' | 'next_business_day'>().notNull(),
  deemedReceivedDays: integer(),
  calendarId: uuid()
    .notNull()
    .references(() => calendars.id),
  noticeAddress: text(),
  portal: text(),
  createdAt: recordedAt(),
})

export const contacts = pgTable('contacts', {
  id: id(),
  organizationId: uuid()
    .notNull()
    .references(() => organizations.id),
  name: text().notNull(),
  desk: text(),
  email: text(),
  phone: text(),
})

export const procedures = pgTable('procedures', {
  id: id(),
  key: text().notNull().unique(),
  title: text().notNull(),
  /** Null: the shipped library. */
  organizationId: uuid().references(() => organizations.id),
})

export const procedureRevisions = pgTable(
  'procedure_revisions',
  {
    id: id(),
    procedureId: uuid()
      .notNull()
      .references(() => procedures.id),
    no: integer().notNull(),
    body: jsonb().$type<ProcedureBody>().notNull(),
    baseRevisionId: uuid(),
    overrides: jsonb(),
    sha256: text().notNull(),
    recordedAt: recordedAt(),
    recordedBy: uuid(),
  },
  (table) => [unique().on(table.procedureId, table.no)],
)
