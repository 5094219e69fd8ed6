/**
 * Brings the database to the newest schema, then grants the application's role what it may do.
 * Usage: NUXT_DATABASE_OWNER_URL=... [WIREWRIGHT_APP_ROLE=wirewright_app] tsx server/database/migrate.ts
 * Safe to run again and by several processes at once: one migrates, the others wait for it.
 */
import { fileURLToPath } from 'node:url'
import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import pg from 'pg'

const MIGRATION_LOCK = 728_114
const APPEND_ONLY = ['order_events', 'ledger_transactions', 'ledger_entries', 'bench_records', 'wire_receipts', 'audit_log']

/** The statements that give the application's role its rights: data only, and no change to what is append-only. */
export function grantStatements(appRole: string): string[] {
  const role = pg.escapeIdentifier(appRole)
  return [
    'revoke create on schema public from public',
    `grant usage on schema public to ${role}`,
    `grant select, insert, update, delete on all tables in schema public to ${role}`,
    `grant usage, select on all sequences in schema public to ${role}`,
    `revoke update, delete, truncate on ${APPEND_ONLY.join(', ')} from ${role}`,
    `grant usage on schema drizzle to ${role}`,
    `grant select on all tables in schema drizzle to ${role}`,
  ]
}

async function main(): Promise<void> {
  const connectionString = process.env.NUXT_DATABASE_OWNER_URL
  if (!connectionString) throw new Error('NUXT_DATABASE_OWNER_URL is missing: the address of the database for the role that owns it.')
  const client = new pg.Client({ connectionString, application_name: 'wirewright-migrate' })
  await client.connect()
  try {
    await client.query('select pg_advisory_lock($1)', [MIGRATION_LOCK])
    await client.query(`set lock_timeout = '5s'`)
    await migrate(drizzle({ client }), { migrationsFolder: fileURLToPath(new URL('../../drizzle', import.meta.url)) })
    const appRole = process.env.WIREWRIGHT_APP_ROLE ?? 'wirewright_app'
    const { rowCount } = await client.query('select 1 from pg_roles where rolname = $1', [appRole])
    if (!rowCount) throw new Error(`There is no database role ${appRole}. Create it, or name another in WIREWRIGHT_APP_ROLE.`)
    for (const statement of grantStatements(appRole)) await client.query(statement)
  }
  finally {
    await client.end()
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? `Migration failed: ${error.message}${error.cause instanceof Error ? ` (${error.cause.message})` : ''}` : error)
  process.exitCode = 1
})
