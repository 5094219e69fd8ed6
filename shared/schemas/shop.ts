import { z } from 'zod'
import { daySchema, textSchema, versionSchema } from './shared-fields'
import type { CoilHand, CompressionEnds, HookForm } from '../spring/codes'
import type { SpringInput } from '../spring/mechanics/spring'
import type { Leg } from '../spring/mechanics/torsion/types'
import type { LoadPoint, MomentPoint } from '../spring/sizing/types'
import type { StoredDesign } from './quote'

export const CENTRE_KINDS = ['coiling', 'stress-relief', 'end-grinding', 'inspection', 'packing'] as const
/** An operation is done at a work centre of its own kind. */
export const OPERATION_KINDS = CENTRE_KINDS
export const OPERATION_STATES = ['waiting', 'planned', 'setting-up', 'running', 'paused', 'finished'] as const
export const JOB_STATES = ['to-plan', 'planned', 'in-work', 'finished', 'dispatched', 'cancelled'] as const
export const BENCH_ACTS = ['start', 'run', 'pause', 'resume', 'count', 'finish'] as const
export type CentreKind = (typeof CENTRE_KINDS)[number]
export type OperationKind = (typeof OPERATION_KINDS)[number]
export type OperationState = (typeof OPERATION_STATES)[number]
export type JobState = (typeof JOB_STATES)[number]
export type BenchAct = (typeof BENCH_ACTS)[number]

export const OPERATION_NAMES: Readonly<Record<OperationKind, string>> = {
  'coiling': 'Coiling', 'stress-relief': 'Stress relief', 'end-grinding': 'End grinding', 'inspection': 'Inspection', 'packing': 'Packing',
}

/** Place one operation: on which work centre and from when; its end follows from its minutes and the shift. */
export const placeOperationBodySchema = z.strictObject({
  centreId: z.uuid(), startsAt: z.iso.datetime({ offset: true, error: 'Give a time, such as 2026-12-09T10:30:00Z.' }), version: versionSchema,
})
export const versionBodySchema = z.strictObject({ version: versionSchema })

export type CentreView = { id: string, code: string, name: string, kind: CentreKind, wireFromMm: number | null, wireToMm: number | null, shiftStartMinute: number, shiftEndMinute: number }
export type OperationView = {
  id: string, position: number, kind: OperationKind, state: OperationState, version: number,
  setUpMinutes: number, runMinutes: number, centreId: string | null, centreCode: string | null,
  startsAt: string | null, endsAt: string | null, startedAt: string | null, finishedAt: string | null,
  goodCount: number | null, scrapCount: number | null, actualSetUpMinutes: number | null, actualRunMinutes: number | null, wireUsedKg: number | null,
}
/** A job as Loading lists it. Only paid orders have one. */
export type JobView = {
  ref: string, orderRef: string, customer: string, title: string, quantity: number, state: JobState, version: number,
  promisedOn: string | null, neededOn: string | null, waitsForWire: boolean, wire: string, wireKg: number, createdAt: string,
  /** Planned end of the last operation, when all are placed. */
  leavesOn: string | null,
  /** By the plan it leaves later than was promised. */
  isLate: boolean, operations: OperationView[],
}
export type LoadingView = { from: string, to: string, timeZone: string, centres: CentreView[], jobs: JobView[], holidays: { day: string, name: string }[] }

/** What an operator does at a work centre. `id` is made on the device: the same one sent twice counts once. */
export const benchRecordBodySchema = z.strictObject({
  id: z.uuid(),
  act: z.enum(BENCH_ACTS),
  /** Counted since the last record; below nought takes back a miscount. */
  good: z.int('A whole number of springs.').min(-1_000_000).max(1_000_000, 'At most 1 000 000.').default(0),
  scrap: z.int('A whole number of springs.').min(-1_000_000).max(1_000_000, 'At most 1 000 000.').default(0),
  wireKg: z.number('Give the mass in kg as a number.').min(0, 'Not below nought.').max(100_000, 'At most 100 000 kg.').optional(),
  /** Corrections to the clock, given at the finish. */
  setUpMinutes: z.number('Give the minutes as a number.').min(0, 'Not below nought.').max(100_000, 'At most 100 000 minutes.').optional(),
  runMinutes: z.number('Give the minutes as a number.').min(0, 'Not below nought.').max(100_000, 'At most 100 000 minutes.').optional(),
  note: textSchema(500).default(''),
})
export type BenchRecordBody = z.input<typeof benchRecordBodySchema>

export type BenchOperation = OperationView & { jobRef: string, customer: string, title: string, quantity: number, goodSoFar: number, scrapSoFar: number, runningSince: string | null, previousDone: boolean }
export type BenchView = { timeZone: string, centre: CentreView, current: BenchOperation | null, next: BenchOperation[], sheet: BenchSheet | null, cautions: string[] }
/** Set-up values of the operation now at the work centre. */
export type BenchSheet = {
  material: string, wireDiameterMm: number, outerDiameterMm: number, innerDiameterMm: number, totalCoils: number, wireLengthMm: number,
  hand: CoilHand, stressRelief: string, wirePlannedKg: number,
  /** The spring itself, to be drawn. */
  spring: SpringInput,
} & (
  | { kind: 'compression', freeLengthMm: number, pitchMm: number, ends: CompressionEnds, loads: LoadPoint[] }
  | { kind: 'extension', insideHooksMm: number, bodyLengthMm: number, hook: HookForm, hookLengthMm: number, initialTensionN: number, loads: LoadPoint[] }
  | { kind: 'torsion', bodyLengthMm: number, legs: Leg[], rodMm: number | null, moments: MomentPoint[] }
)
/** One job's own page. */
export type JobSheetView = JobView & {
  timeZone: string, wireProductId: string | null, design: StoredDesign | null, sheet: BenchSheet | null,
  /** The work centres that take this job's wire. */
  centres: CentreView[], history: { at: string, who: string, words: string }[], cautions: string[],
}
export const loadingQuerySchema = z.strictObject({ from: daySchema.optional(), days: z.coerce.number().int().min(1).max(60).default(14) })
