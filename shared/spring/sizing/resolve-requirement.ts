import { checkSizeRequirement } from './check-requirement'
import { resolveTravel } from './compression/travel'
import type { CompressionSizeRequest, LoadPoint } from './types'

type Entry = number | null | undefined

/** What a customer knows, as the order form asks it. An empty field is null or undefined. */
export type RequirementForm =
  | { readonly form: 'two-loads', readonly length1Mm: Entry, readonly force1N: Entry, readonly length2Mm: Entry, readonly force2N: Entry }
  | { readonly form: 'load-and-rate', readonly lengthMm: Entry, readonly forceN: Entry, readonly rateNPerMm: Entry }
  | { readonly form: 'rate-and-free-length', readonly rateNPerMm: Entry, readonly freeLengthMm: Entry, readonly shortestLengthMm?: Entry }

export type RequirementField =
  | 'length1Mm' | 'force1N' | 'length2Mm' | 'force2N' | 'lengthMm' | 'forceN' | 'rateNPerMm' | 'freeLengthMm' | 'shortestLengthMm'

export interface FieldError {
  readonly field: RequirementField
  readonly message: string
}

/** The part of a size request that says what the spring must do. */
export type ResolvedRequirement = Pick<CompressionSizeRequest, 'points' | 'rateNPerMm' | 'freeLengthMm'>

export type RequirementResolution =
  | { readonly ok: true, readonly requirement: ResolvedRequirement }
  | { readonly ok: false, readonly errors: readonly FieldError[] }

const FIELD_NAMES: Readonly<Record<RequirementField, string>> = {
  length1Mm: 'the first length',
  force1N: 'the first force',
  length2Mm: 'the second length',
  force2N: 'the second force',
  lengthMm: 'the length under load',
  forceN: 'the force',
  rateNPerMm: 'the rate',
  freeLengthMm: 'the free length',
  shortestLengthMm: 'the shortest length',
}

/**
 * Turns a form of the requirement into the points, rate and free length of a size request, or says what is wrong beside
 * each field. Two loads entered the other way round are put in order.
 */
export function resolveRequirement(form: RequirementForm): RequirementResolution {
  const errors: FieldError[] = []
  const read = (field: RequirementField, value: Entry): number => {
    const name = FIELD_NAMES[field]
    if (value === null || value === undefined) errors.push({ field, message: `Enter ${name}.` })
    else if (!Number.isFinite(value)) errors.push({ field, message: `${capital(name)} must be a number.` })
    else if (value <= 0) errors.push({ field, message: `${capital(name)} must be more than zero.` })
    else return value
    return Number.NaN
  }

  if (form.form === 'two-loads') {
    const first = { lengthMm: read('length1Mm', form.length1Mm), forceN: read('force1N', form.force1N) }
    const second = { lengthMm: read('length2Mm', form.length2Mm), forceN: read('force2N', form.force2N) }
    if (errors.length > 0) return { ok: false, errors }
    const reversed = second.lengthMm > first.lengthMm && second.forceN < first.forceN
    return finish({ points: reversed ? [second, first] : [first, second] }, { 'points.1.lengthMm': 'length2Mm', 'points.1.forceN': 'force2N' })
  }

  if (form.form === 'load-and-rate') {
    const point = { lengthMm: read('lengthMm', form.lengthMm), forceN: read('forceN', form.forceN) }
    const rateNPerMm = read('rateNPerMm', form.rateNPerMm)
    if (errors.length > 0) return { ok: false, errors }
    return finish({ points: [point], rateNPerMm }, {})
  }

  const rateNPerMm = read('rateNPerMm', form.rateNPerMm)
  const freeLengthMm = read('freeLengthMm', form.freeLengthMm)
  const hasShortest = form.shortestLengthMm !== null && form.shortestLengthMm !== undefined
  const shortest = hasShortest ? read('shortestLengthMm', form.shortestLengthMm) : Number.NaN
  if (errors.length > 0) return { ok: false, errors }
  if (!hasShortest) return finish({ points: [], rateNPerMm, freeLengthMm }, {})
  if (shortest >= freeLengthMm) {
    return {
      ok: false,
      errors: [{ field: 'shortestLengthMm', message: `The shortest length (${shortest} mm) must be shorter than the free length (${freeLengthMm} mm).` }],
    }
  }
  // A shortest length and the rate are a load at a length; with the free length they fix the rate again.
  return finish({ points: [{ lengthMm: shortest, forceN: rateNPerMm * (freeLengthMm - shortest) }], freeLengthMm }, {})
}

function finish(requirement: { points: LoadPoint[], rateNPerMm?: number, freeLengthMm?: number }, fields: Readonly<Record<string, RequirementField>>): RequirementResolution {
  const errors = checkSizeRequirement(requirement).flatMap(({ path, message }) => {
    const field = fields[path.join('.')]
    return field ? [{ field, message }] : []
  })
  return errors.length > 0 ? { ok: false, errors } : { ok: true, requirement }
}

/** Rate and free length a resolved requirement implies, for drawing before anything is sized; null where the rate is open. */
export function impliedRateAndFreeLength(requirement: ResolvedRequirement): { readonly rateNPerMm: number, readonly freeLengthMm: number } | null {
  const travel = resolveTravel({ kind: 'compression', ...requirement })
  return travel.kind === 'fixed' ? { rateNPerMm: travel.rateNPerMm, freeLengthMm: travel.freeLengthMm } : null
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
