import { z } from 'zod'
import type { SpringKind } from '../../spring/codes'
import { readAddress, type SpringQuery } from '../../spring/sheet/address'
import { EvaluateRequestSchema, type EvaluateRequest } from './evaluate'

/** A spring's address as read and checked. */
export interface SpringAddress {
  readonly kind: SpringKind | null
  /** Null until everything that is needed is there and can be read. */
  readonly spring: EvaluateRequest | null
  /** What is wrong, by parameter. */
  readonly faults: Readonly<Record<string, string>>
  /** What is needed and not there yet, by parameter. */
  readonly missing: Readonly<Record<string, string>>
}

/** Reads the query of a spring's address by the schema that every evaluation is parsed with. Never throws. */
export function readSpringAddress(query: SpringQuery): SpringAddress {
  const { kind, request, faults: unread, paramAt } = readAddress(query)
  const faults: Record<string, string> = { ...unread }
  const missing: Record<string, string> = {}
  if (!kind) return { kind, spring: null, faults, missing }
  const parsed = EvaluateRequestSchema.safeParse(request)
  if (!parsed.success) {
    for (const issue of parsed.error.issues) {
      const param = paramAt(issue.path)
      if (param in faults) continue
      if (query[param]?.trim()) faults[param] = issue.message
      else missing[param] ??= issue.message
    }
  }
  return { kind, spring: parsed.success && Object.keys(faults).length === 0 ? parsed.data : null, faults, missing }
}

/** What may stand beside the spring in the address of its data sheet. */
const SHEET_OWN = { units: z.enum(['metric', 'inch'], { error: 'units must be metric or inch.' }).optional() }

/** Query of `GET /api/springs/sheet.pdf`: the spring's address as on the page, and the units to print in. */
export const SpringSheetQuerySchema = z.record(z.string(), z.string()).transform(({ units, ...query }, context) => {
  const own = z.strictObject(SHEET_OWN).safeParse(units === undefined ? {} : { units })
  for (const issue of own.error?.issues ?? []) context.addIssue({ code: 'custom', path: ['units'], message: issue.message })
  const { spring, faults, missing } = readSpringAddress(query)
  for (const [param, message] of Object.entries({ ...missing, ...faults })) context.addIssue({ code: 'custom', path: [param], message })
  if (!spring || !own.success) return z.NEVER
  return { spring, units: own.data.units ?? 'metric', query }
})
