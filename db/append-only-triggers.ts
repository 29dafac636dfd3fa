import type { Client } from 'pg'
import { appendOnlyTables } from '@/db/append-only'

const refuseChange = `
create or replace function refuse_change() returns trigger language plpgsql as $$
begin
  raise exception '% is append-only: % refused; record a correction instead', tg_table_name, tg_op
    using errcode = 'restrict_violation';
end $$`

function guard(table: string): string {
  return `
create or replace trigger "${table}_append_only_rows" before update or delete on "${table}"
  for each row execute function refuse_change();
create or replace trigger "${table}_append_only_table" before truncate on "${table}"
  for each statement execute function refuse_change();`
}

/**
 * Guards every append-only table against UPDATE, DELETE and TRUNCATE, also for its owner.
 * Safe to run again.
 * @throws Error naming tables of the list that the migrations did not make.
 */
export async function guardAppendOnlyTables(client: Client): Promise<void> {
  const known = await client.query<{ tablename: string }>(
    `select tablename from pg_tables where schemaname = 'public'`,
  )
  const existing = new Set(known.rows.map((row) => row.tablename))
  const missing = appendOnlyTables.filter((table) => !existing.has(table))
  if (missing.length > 0) {
    throw new Error(`db/append-only.ts names tables that do not exist: ${missing.join(', ')}`)
  }
  await client.query([refuseChange, ...appendOnlyTables.map(guard)].join(';\n'))
}
