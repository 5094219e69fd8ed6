import { sql } from 'drizzle-orm'
import type { OperationView } from '#shared/schemas/shop'
import { operations, workCentres } from '../../database/schema'

/** The columns an operation's view is made of; join work_centres on the operation's centre. */
export const operationColumns = {
  id: operations.id, jobId: operations.jobId, position: operations.position, kind: operations.kind, state: operations.state, version: operations.version,
  setUpMinutes: operations.setUpMinutes, runMinutes: operations.runMinutes, centreId: operations.workCentreId, centreCode: workCentres.code,
  startsAt: sql<Date | null>`lower(${operations.plannedSpan})`.mapWith(toDate), endsAt: sql<Date | null>`upper(${operations.plannedSpan})`.mapWith(toDate),
  startedAt: operations.startedAt, finishedAt: operations.finishedAt, goodCount: operations.goodCount, scrapCount: operations.scrapCount,
  actualSetUpMinutes: operations.actualSetUpMinutes, actualRunMinutes: operations.actualRunMinutes, wireUsedKg: operations.wireUsedKg,
}

function toDate(value: string | Date): Date {
  return value instanceof Date ? value : new Date(value)
}

export type OperationRow = {
  id: string, jobId: string, position: number, kind: OperationView['kind'], state: OperationView['state'], version: number, setUpMinutes: string, runMinutes: string,
  centreId: string | null, centreCode: string | null, startsAt: Date | null, endsAt: Date | null, startedAt: Date | null, finishedAt: Date | null,
  goodCount: number | null, scrapCount: number | null, actualSetUpMinutes: string | null, actualRunMinutes: string | null, wireUsedKg: string | null,
}

const numberOrNull = (text: string | null) => text === null ? null : Number(text)
const isoOrNull = (moment: Date | null) => moment?.toISOString() ?? null

/** The operation as pages may see it. */
export function toOperationView(row: OperationRow): OperationView {
  return {
    id: row.id, position: row.position, kind: row.kind, state: row.state, version: row.version,
    setUpMinutes: Number(row.setUpMinutes), runMinutes: Number(row.runMinutes), centreId: row.centreId, centreCode: row.centreCode,
    startsAt: isoOrNull(row.startsAt), endsAt: isoOrNull(row.endsAt), startedAt: isoOrNull(row.startedAt), finishedAt: isoOrNull(row.finishedAt),
    goodCount: row.goodCount, scrapCount: row.scrapCount, actualSetUpMinutes: numberOrNull(row.actualSetUpMinutes), actualRunMinutes: numberOrNull(row.actualRunMinutes),
    wireUsedKg: numberOrNull(row.wireUsedKg),
  }
}
