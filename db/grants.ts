import type { Client } from 'pg'
import { appendOnlyTables } from '@/db/append-only'

const jobs = 'graphile_worker'

/** Rights on our own tables: everything day-to-day, but append-only rows stay as recorded. */
function ownTables(role: string): string[] {
  return [
    `grant usage on schema public to ${role}`,
    `grant select, insert, update, delete on all tables in schema public to ${role}`,
    `grant usage, select on all sequences in schema public to ${role}`,
    ...appendOnlyTables.map(
      (table) => `revoke update, delete, truncate on "${table}" from ${role}`,
    ),
  ]
}

/** Rights on the job queue: add, take and finish jobs, without owning its schema. */
function jobTables(role: string): string[] {
  return [
    `grant usage on schema ${jobs} to ${role}`,
    `grant select, insert, update, delete on all tables in schema ${jobs} to ${role}`,
    `revoke insert, update, delete on ${jobs}.migrations from ${role}`,
    `grant usage, select on all sequences in schema ${jobs} to ${role}`,
    `grant execute on all functions in schema ${jobs} to ${role}`,
  ]
}

// graphile-worker turns row level security on for its tables and leaves the policies to us.
async function jobPolicies(client: Client, role: string): Promise<string[]> {
  const guarded = await client.query<{ relname: string }>(
    `select relname from pg_class where relnamespace = $1::regnamespace and relrowsecurity`,
    [jobs],
  )
  return guarded.rows.flatMap(({ relname }) => [
    `drop policy if exists application on ${jobs}."${relname}"`,
    `create policy application on ${jobs}."${relname}" to ${role} using (true) with check (true)`,
  ])
}

/**
 * Gives the application role what it needs and takes away what it must not have.
 * Run as the owner, in one transaction, after the migrations. Safe to run again.
 */
export async function grantToApplication(client: Client, applicationRole: string): Promise<void> {
  const role = client.escapeIdentifier(applicationRole)
  const policies = await jobPolicies(client, role)
  for (const statement of [...ownTables(role), ...jobTables(role), ...policies]) {
    await client.query(statement)
  }
}
