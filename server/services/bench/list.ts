import { asc, eq, sql } from 'drizzle-orm'
import type { CentreView } from '#shared/schemas/shop'
import { workCentres } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { toCentreView } from './view'

export type BenchListItem = CentreView & { waiting: number, current: string | null }

/** The work centres with how many operations wait there and which job is in work. */
export async function listBenches(context: ServiceContext): Promise<{ centres: BenchListItem[] }> {
  assertRole(context, 'operator', 'supervisor', 'admin')
  // Named in full: of a single table drizzle writes a column without its table, which a subquery would take for its own.
  const centreId = sql`${workCentres}.id`
  const rows = await context.db.select({
    centre: workCentres,
    waiting: sql<number>`(select count(*)::int from operations o join jobs j on j.id = o.job_id where o.work_centre_id = ${centreId} and o.state = 'planned' and j.state <> 'cancelled')`,
    current: sql<string | null>`(select 'J-' || j.number from operations o join jobs j on j.id = o.job_id where o.work_centre_id = ${centreId} and o.state in ('setting-up', 'running', 'paused') order by o.started_at limit 1)`,
  }).from(workCentres).where(eq(workCentres.isActive, true)).orderBy(asc(workCentres.code)).limit(100)
  return { centres: rows.map(row => ({ ...toCentreView(row.centre), waiting: row.waiting, current: row.current })) }
}
