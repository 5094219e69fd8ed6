import fc from 'fast-check'
import type { CompressionSizeRequest } from '#shared/spring'
import { EN_CODES, makeWires } from './springs'

/** Evenly spread: fast-check's own doubles lie mostly near nought. */
export const evenly = (min: number, max: number) => fc.integer({ min: 0, max: 1_000_000 }).map(i => min + ((max - min) * i) / 1_000_000)
export const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined })

const conditions = fc.record({
  ends: fc.constantFrom('closed-ground' as const, 'closed' as const, 'open' as const, 'open-ground' as const),
  method: fc.constantFrom('en13906' as const, 'wahl' as const),
  duty: maybe(fc.record({ cycles: fc.constantFrom(1e3, 5e4, 1e6) })),
  shotPeened: fc.boolean(), preset: fc.boolean(), toleranceGrade: fc.constantFrom(1 as const, 2 as const, 3 as const),
  seatingCoefficient: fc.constantFrom(0.5 as const, 0.707 as const, 1 as const, 2 as const), guided: fc.boolean(), solidSafe: fc.boolean(),
})

/** What a spring that could be made does: wire, index, coils, how far it is from solid and how hard it is pressed, and room around it. */
const does = {
  wire: fc.constantFrom(...makeWires(...EN_CODES)), w: evenly(4, 20), n: evenly(2, 20), room: evenly(1, 2), stressMpa: evenly(50, 900), spread: evenly(0.05, 0.9), conditions,
  fit: fc.record({ bore: maybe(evenly(0.9, 1.6)), rod: maybe(evenly(0.4, 1.1)), solid: maybe(evenly(0.8, 2)), free: maybe(evenly(0.8, 2)) }),
}
type Does = { [K in keyof typeof does]: (typeof does)[K] extends fc.Arbitrary<infer T> ? T : never }

/** A request for what some spring does, so that it is often met and often just not. */
function requestOf({ wire, w, n, room, stressMpa, spread, conditions, fit }: Does, loads: 1 | 2): { wire: Does['wire'], request: CompressionSizeRequest } {
  const d = wire.wireDiameterMm
  const rate = (80_000 * d) / (8 * w ** 3 * n)
  const lengthMm = (n + 3) * d * room
  const forceN = (stressMpa * Math.PI * d * d) / (8 * w)
  const times = (share: number | undefined, mm: number) => (share === undefined ? undefined : share * mm)
  const first = { lengthMm: lengthMm + (forceN * (1 - spread)) / rate, forceN: forceN * spread }
  return {
    wire,
    request: {
      kind: 'compression', points: loads === 2 ? [first, { lengthMm, forceN }] : [{ lengthMm, forceN }], ...conditions,
      fit: {
        boreMm: times(fit.bore, (w + 1) * d), rodMm: times(fit.rod, (w - 1) * d), maxSolidLengthMm: times(fit.solid, (n + 2) * d),
        maxFreeLengthMm: times(fit.free, lengthMm + forceN / rate),
      },
    },
  }
}

/** Two loads at two lengths, with the wire of the spring that does it. */
export const twoLoads = fc.record(does).map(spring => requestOf(spring, 2))
/** One load at one length. */
export const oneLoad = fc.record(does).map(spring => requestOf(spring, 1))
