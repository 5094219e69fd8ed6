import fc from 'fast-check'
import {
  COIL_HANDS, COMPRESSION_ENDS, HOOK_FORMS, LEG_FORMS, MATERIAL_CODES, SEATING_COEFFICIENTS, STRESS_METHODS, TOLERANCE_GRADES,
} from '#shared/spring/codes'
import type { EvaluateRequest } from '#shared/schemas/spring'

// The sum turns a minus nought, which no address tells from nought, into nought.
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true, noDefaultInfinity: true }).map(value => value + 0)
const optional = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: undefined })
const choice = <T>(values: readonly T[]) => fc.constantFrom(...values)

/** Leaves out what is undefined, all the way down, as a request does; empty objects go too. */
function compact(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(compact)
  if (typeof value !== 'object' || value === null) return value
  const kept = Object.entries(value).flatMap(([key, one]) => {
    const inner = compact(one)
    const isEmpty = inner === undefined || (typeof inner === 'object' && inner !== null && !Array.isArray(inner) && Object.keys(inner).length === 0)
    return isEmpty ? [] : [[key, inner] as const]
  })
  return Object.fromEntries(kept)
}

const conditions = {
  method: optional(choice(STRESS_METHODS)),
  temperatureC: optional(between(-273, 1500)),
  duty: fc.record({ cycles: optional(between(0, 1e12)), strokesPerMinute: optional(between(0, 1e5)) }),
  shotPeened: optional(fc.boolean()),
  preset: optional(fc.boolean()),
  toleranceGrade: optional(choice(TOLERANCE_GRADES)),
  fit: fc.record({ boreMm: optional(between(100, 5000)), rodMm: optional(between(0.01, 99)), maxFreeLengthMm: optional(between(100, 20_000)), maxSolidLengthMm: optional(between(0.01, 99)) }),
}
const wound = {
  material: choice(MATERIAL_CODES),
  wireDiameterMm: between(0.01, 50),
  meanDiameterMm: between(80, 5000),
  materialValues: fc.record({
    tensileStrengthMpa: optional(between(50, 10_000)), shearModulusMpa: optional(between(1000, 500_000)), youngsModulusMpa: optional(between(1000, 1_000_000)), densityKgPerM3: optional(between(500, 25_000)),
  }),
  hand: optional(choice(COIL_HANDS)),
  ...conditions,
}
const some = <T>(arbitrary: fc.Arbitrary<T>, maxLength: number) => optional(fc.array(arbitrary, { minLength: 1, maxLength }))
const loadPoint = fc.oneof(
  between(0.01, 20_000).map(lengthMm => ({ lengthMm })), between(0.0001, 1e7).map(forceN => ({ forceN })), between(0, 20_000).map(deflectionMm => ({ deflectionMm })),
)
const turnPoint = fc.oneof(between(0.001, 360_000).map(angleDeg => ({ angleDeg })), between(0.0001, 1e9).map(momentNmm => ({ momentNmm })))

const compression = fc.record({
  kind: fc.constant('compression' as const), ...wound,
  activeCoils: between(0.1, 1000), totalCoils: optional(between(1000, 1100)), freeLengthMm: between(0.01, 20_000), points: some(loadPoint, 6),
  ends: optional(choice(COMPRESSION_ENDS)), seatingCoefficient: optional(choice(SEATING_COEFFICIENTS)), guided: optional(fc.boolean()), solidSafe: optional(fc.boolean()),
})
const extension = fc.record({
  kind: fc.constant('extension' as const), ...wound,
  bodyCoils: between(0.1, 500), activeCoils: optional(between(500, 1000)), initialTensionN: between(0, 1_000_000), insideHooksFreeLengthMm: optional(between(0.01, 20_000)), points: some(loadPoint, 6),
  hook: optional(fc.record({ form: choice(HOOK_FORMS), bendRadiusMm: optional(between(0.005, 5000)), sideBendRadiusMm: optional(between(0.005, 5000)) })),
})
const torsion = fc.record({
  kind: fc.constant('torsion' as const), ...wound,
  bodyCoils: between(0.1, 500), activeCoils: optional(between(500, 1000)), points: some(turnPoint, 6),
  legs: some(fc.record({ lengthMm: between(0.01, 5000), form: choice(LEG_FORMS) }), 2), loadOpens: optional(fc.boolean()),
})

/** Any request that the schema of evaluation takes, with every field sometimes there: wild sizes, not sensible springs. */
export const anySpring: fc.Arbitrary<EvaluateRequest> = fc.oneof(compression, extension, torsion).map(spring => compact(spring) as EvaluateRequest)
