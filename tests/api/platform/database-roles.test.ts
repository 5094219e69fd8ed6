import pg from 'pg'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'

/** Security requirement S-52: the role that runs the app owns nothing and cannot alter the schema. */
describe('the database role that runs the app', () => {
  const client = new pg.Client({ connectionString: inject('databaseUrl') })
  beforeAll(() => client.connect())
  afterAll(() => client.end())
  const refusalOf = (sql: string): Promise<string> => client.query(sql).then(() => 'done', (error: { code?: string }) => error.code ?? 'no code')
  const INSUFFICIENT_PRIVILEGE = '42501'

  it('owns nothing', async () => {
    const { rows } = await client.query(`
      select relname as name from pg_class where relowner = current_user::regrole
      union all select nspname from pg_namespace where nspowner = current_user::regrole
      union all select datname from pg_database where datdba = current_user::regrole`)
    expect(rows).toEqual([])
  })

  it('is no superuser and may make neither roles nor databases', async () => {
    const { rows } = await client.query('select rolsuper, rolcreaterole, rolcreatedb, rolbypassrls, rolreplication from pg_roles where rolname = current_user')
    expect(rows).toEqual([{ rolsuper: false, rolcreaterole: false, rolcreatedb: false, rolbypassrls: false, rolreplication: false }])
  })

  it.each(['create table public.intruder (id int)', 'create schema intruder', 'create temporary table intruder (id int)', 'create extension pg_trgm schema public'])('is refused: %s', async (sql) => {
    expect(await refusalOf(sql)).toBe(INSUFFICIENT_PRIVILEGE)
  })

  it('may neither alter, truncate nor drop any table, nor touch the record of migrations', async () => {
    const { rows } = await client.query<{ name: string }>(`select format('%I.%I', schemaname, tablename) as name from pg_tables where schemaname = 'public'`)
    expect(rows.length).toBeGreaterThan(10)
    for (const { name } of rows) {
      for (const sql of [`alter table ${name} add column intruder int`, `truncate ${name} cascade`, `drop table ${name} cascade`]) expect([sql, await refusalOf(sql)]).toEqual([sql, INSUFFICIENT_PRIVILEGE])
    }
    expect(await refusalOf('delete from drizzle.__drizzle_migrations')).toBe(INSUFFICIENT_PRIVILEGE)
  })
})

describe('the database server', () => {
  it('lets nobody in without the password, although other users of the machine reach its port', async () => {
    for (const role of ['wirewright_app', 'wirewright_owner', 'wirewright_admin']) {
      const url = new URL(inject('databaseUrl'))
      url.username = role
      url.password = 'guess'
      const client = new pg.Client({ connectionString: url.href })
      await expect(client.connect()).rejects.toMatchObject({ code: '28P01' })
    }
  })
})
