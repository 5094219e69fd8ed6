import type { OperationKind } from '../pricing'
import type { Interval, WorkCalendar } from './calendar'
import { PlanningError } from './errors'
import { earliestSlot } from './slot'
import { toLocalTime } from '#shared/time/zone'

/** A work centre as the plan sees it. */
export interface PlanCentre {
  id: string
  kind: OperationKind
  /** Wire it can take, null where any. */
  wireFromMm: number | null
  wireToMm: number | null
  calendar: WorkCalendar
}

export interface PlacedOperation extends Interval {
  position: number
  kind: OperationKind
  centreId: string
}

export interface PlacedJob {
  operations: PlacedOperation[]
  /** End of the last operation. */
  finishedMs: number
  /** ISO date of that end in the last centre's zone: the day the job can leave. */
  dispatchOn: string
}

export interface PlaceJobRequest {
  operations: readonly { position: number, kind: OperationKind, centreKind?: OperationKind, setUpMinutes: number, runMinutes: number }[]
  centres: readonly PlanCentre[]
  /** Taken stretches by centre id; a centre not named is free. */
  busyByCentre: Readonly<Record<string, readonly Interval[]>>
  wireDiameterMm: number
  notBeforeMs: number
}

/** True where the centre's wire range holds the diameter, ends included. */
export function takesWire(centre: Pick<PlanCentre, 'wireFromMm' | 'wireToMm'>, wireDiameterMm: number): boolean {
  return (centre.wireFromMm === null || wireDiameterMm >= centre.wireFromMm) && (centre.wireToMm === null || wireDiameterMm <= centre.wireToMm)
}

/**
 * Places a job's operations one after another, each on the able centre where it is done soonest (then started soonest, then by
 * id), never over a busy stretch and never before the one before it is done. Throws PlanningError `no-centre` where none can do one.
 */
export function placeJob({ operations, centres, busyByCentre, wireDiameterMm, notBeforeMs }: PlaceJobRequest): PlacedJob {
  const placed: PlacedOperation[] = []
  let readyMs = notBeforeMs
  let lastCentre: PlanCentre | undefined

  for (const operation of [...operations].sort((a, b) => a.position - b.position)) {
    const centreKind = operation.centreKind ?? operation.kind
    const able = centres.filter((centre) => centre.kind === centreKind && takesWire(centre, wireDiameterMm))
    const choices = able.map((centre) => ({
      centre,
      slot: earliestSlot({
        calendar: centre.calendar,
        busy: [...(busyByCentre[centre.id] ?? []), ...placed.filter((other) => other.centreId === centre.id)],
        durationMinutes: Math.max(1, operation.setUpMinutes + operation.runMinutes),
        notBeforeMs: readyMs,
      }),
    }))
    const [best] = choices.sort((a, b) => a.slot.endMs - b.slot.endMs || a.slot.startMs - b.slot.startMs || compareText(a.centre.id, b.centre.id))
    if (!best) {
      throw new PlanningError('no-centre', `No work centre for ${centreKind} takes wire of ${wireDiameterMm} mm.`, centreKind)
    }
    placed.push({ position: operation.position, kind: operation.kind, centreId: best.centre.id, ...best.slot })
    readyMs = best.slot.endMs
    lastCentre = best.centre
  }
  if (!lastCentre) throw new PlanningError('minutes-missing', 'A job has at least one operation.', 'operations')
  return { operations: placed, finishedMs: readyMs, dispatchOn: toLocalTime(readyMs, lastCentre.calendar.timeZone).day }
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0
}
