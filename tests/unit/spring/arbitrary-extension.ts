import fc from 'fast-check'
import { HOOK_FORMS } from '#shared/spring/codes'
import { getMaterial, modulusMpa, type ExtensionSizeRequest, type SizingWire } from '#shared/spring'
import { hookLengthMm } from '../../../shared/spring/mechanics/extension/hooks'
import { evenly, maybe } from './arbitrary-compression'
import { EN_CODES, makeWires } from './springs'

/** What a request fixes. */
export const ASKED = ['two-loads', 'load-and-rate', 'load-and-length', 'one-load', 'rate-and-length'] as const
export type Asked = (typeof ASKED)[number]

const conditions = fc.record({
  method: fc.constantFrom('en13906' as const, 'wahl' as const),
  duty: maybe(fc.record({ cycles: fc.constantFrom(1e3, 1e6) })),
  toleranceGrade: fc.constantFrom(1 as const, 2 as const, 3 as const),
  hook: fc.record({ form: fc.constantFrom(...HOOK_FORMS), bendRadiusMm: fc.constant(undefined), sideBendRadiusMm: maybe(evenly(1, 12)) }),
})

/** What a spring that could be made does: wire, index, coils, initial stress as a share of the greatest sensible, pull, and room around it. */
const does = {
  wire: fc.constantFrom(...makeWires(...EN_CODES)), w: evenly(4, 20), n: evenly(3, 40), initial: evenly(-0.1, 1.1), stressMpa: evenly(20, 600), spread: evenly(0, 0.95), conditions,
  fit: fc.record({ bore: maybe(evenly(0.9, 1.6)), rod: maybe(evenly(0.4, 1.1)), solid: maybe(evenly(0.8, 2)), free: maybe(evenly(0.8, 2)) }),
}
type Does = { [K in keyof typeof does]: (typeof does)[K] extends fc.Arbitrary<infer T> ? T : never }

/** A request for what some spring does, so that it is often met and often just not, with the wire of that spring. */
export interface ExtensionAsk {
  readonly wire: SizingWire
  /** Of that spring. */
  readonly meanDiameterMm: number
  readonly request: ExtensionSizeRequest
}

function requestOf({ wire, w, n, initial, stressMpa, spread, conditions, fit }: Does, asked: Asked): ExtensionAsk {
  const d = wire.wireDiameterMm
  const material = getMaterial(wire.material)
  const G = modulusMpa(material.shearModulus, d)
  const rate = (G * d) / (8 * w ** 3 * (n + G / modulusMpa(material.youngsModulus, d)))
  const freeLengthMm = (n + 1) * d + 2 * hookLengthMm(conditions.hook.form, w * d, d)
  // Shigley: the greatest sensible initial stress at this index.
  const greatestMpa = 231 / Math.exp(0.105 * w) + 6.9 * (4 - (w - 3) / 6.5)
  const forceAt = (mpa: number) => (mpa * Math.PI * d * d) / (8 * w)
  const tensionN = forceAt(initial * greatestMpa)
  const at = (forceN: number) => ({ lengthMm: freeLengthMm + (forceN - tensionN) / rate, forceN })
  const last = at(Math.max(0, tensionN) + forceAt(stressMpa))
  const first = at(Math.max(0, tensionN) + forceAt(stressMpa * spread) + 0.001 * last.forceN)
  const times = (share: number | undefined, mm: number) => (share === undefined ? undefined : share * mm)
  return {
    wire,
    meanDiameterMm: w * d,
    request: {
      kind: 'extension', ...conditions,
      points: asked === 'rate-and-length' ? [] : asked === 'two-loads' ? [first, last] : [last],
      rateNPerMm: asked === 'load-and-rate' || asked === 'rate-and-length' ? rate : undefined,
      freeLengthMm: asked === 'load-and-length' || asked === 'rate-and-length' ? freeLengthMm : undefined,
      fit: {
        boreMm: times(fit.bore, (w + 1) * d), rodMm: times(fit.rod, (w - 1) * d), maxSolidLengthMm: times(fit.solid, (n + 1) * d),
        maxFreeLengthMm: asked === 'load-and-length' || asked === 'rate-and-length' ? undefined : times(fit.free, freeLengthMm),
      },
    },
  }
}

/** Requests that fix what is named, each with the wire of the spring that does it. */
export const extensionAsks = (asked: Asked): fc.Arbitrary<ExtensionAsk> => fc.record(does).map(spring => requestOf(spring, asked))
