import { customType, timestamp, uuid, date, bigint } from 'drizzle-orm/pg-core'

/** A row's own id, made by the database unless the client made one. */
export const id = () => uuid().primaryKey().defaultRandom()

/** An instant. */
export const instant = () => timestamp({ withTimezone: true, mode: 'date' })

/** When the row was written. */
export const recordedAt = () =>
  timestamp({ withTimezone: true, mode: 'date' }).notNull().defaultNow()

/** A civil date, `YYYY-MM-DD`; never an instant. */
export const civilDate = () => date({ mode: 'string' })

/** Money in minor units (US cents). */
export const minorUnits = () => bigint({ mode: 'number' })

/** A case-insensitive address, kept lower-case by the services. */
export const lowerText = customType<{ data: string }>({ dataType: () => 'text' })
