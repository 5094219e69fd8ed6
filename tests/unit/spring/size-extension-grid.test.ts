import fc from 'fast-check'
import { expect, it } from 'vitest'
import { evaluateExtension, getMaterial, modulusMpa, sizeSpring, type ExtensionInput, type ExtensionSizeRequest, type SizingWire } from '#shared/spring'
import { hookLengthMm } from '../../../shared/spring/mechanics/extension/hooks'
import { ASKED, extensionAsks, type Asked } from './arbitrary-extension'
import { EN_CODES, makeWires } from './springs'

const catalogue = makeWires(...EN_CODES)
/** Thicknesses near the one whose spring is asked for. */
const wiresNear = ({ wireDiameterMm: d }: SizingWire) => catalogue.filter(wire => wire.wireDiameterMm > d * 0.9 && wire.wireDiameterMm < d * 1.12)

interface Tried {
  readonly massG: number
  readonly stressMpa: number
}
interface Grid {
  readonly diameters: number
  readonly coils: number
}

/** Stiffness G d^4/8 and the hooks' coils G/E of a wire, N mm^2. */
function wireNumbers({ material, wireDiameterMm: d }: SizingWire) {
  const G = modulusMpa(getMaterial(material).shearModulus, d)
  return { stiff: (G * d ** 4) / 8, hookCoils: G / modulusMpa(getMaterial(material).youngsModulus, d) }
}

/** A spring that meets the request exactly, evaluated as a caller would; null where a check stops it. What plainly fails is not evaluated. */
function tryOne(request: ExtensionSizeRequest, wire: SizingWire, D: number, bodyCoils: number): Tried | null {
  const d = wire.wireDiameterMm
  if (!(bodyCoils >= 2.99)) return null
  const { stiff, hookCoils } = wireNumbers(wire)
  const freeLengthMm = (bodyCoils + 1) * d + 2 * hookLengthMm(request.hook?.form ?? 'full-loop', D, d)
  const rate = stiff / (D ** 3 * (bodyCoils + hookCoils))
  const [first] = request.points
  const initialTensionN = first ? first.forceN - rate * (first.lengthMm - freeLengthMm) : (231 / Math.exp((0.105 * D) / d)) * ((Math.PI * d ** 3) / (8 * D))
  const greatestMpa = 231 / Math.exp((0.105 * D) / d) + 6.9 * (4 - (D / d - 3) / 6.5)
  if (first && (freeLengthMm > first.lengthMm * 1.001 || initialTensionN < -1e-3 * first.forceN || (8 * initialTensionN * D) / (Math.PI * d ** 3) > 1.001 * greatestMpa)) return null
  const spring: ExtensionInput = {
    kind: 'extension', material: wire.material, wireDiameterMm: d, meanDiameterMm: D, bodyCoils, insideHooksFreeLengthMm: freeLengthMm, initialTensionN,
    hook: request.hook, method: request.method, duty: request.duty, toleranceGrade: request.toleranceGrade, fit: request.fit, points: request.points.map(({ lengthMm }) => ({ lengthMm })),
  }
  const { checks, massG, points, initialStressMpa } = evaluateExtension(spring)
  if (checks.some(check => !check.ok && check.severity === 'stop')) return null
  return { massG, stressMpa: points[points.length - 1]?.stressMpa ?? initialStressMpa }
}

/** Springs over a dense grid of mean diameters, with the coils that the request leaves or, for one load, over a grid of coils too. */
function tryGrid(asked: Asked, request: ExtensionSizeRequest, wires: readonly SizingWire[], { diameters, coils }: Grid): Tried[] {
  const tried: Tried[] = []
  const [p1, p2] = request.points
  for (const wire of wires) {
    const d = wire.wireDiameterMm
    const { stiff, hookCoils } = wireNumbers(wire)
    const rate = p1 && p2 ? (p2.forceN - p1.forceN) / (p2.lengthMm - p1.lengthMm) : request.rateNPerMm
    const ofRate = (D: number) => stiff / (D ** 3 * (rate ?? Number.NaN)) - hookCoils
    const ofLength = (D: number) => ((request.freeLengthMm ?? Number.NaN) - 2 * hookLengthMm(request.hook?.form ?? 'full-loop', D, d)) / d - 1
    let previous = Number.NaN
    for (let i = 0; i <= diameters; i++) {
      let D = d * (4 + (16 * i) / diameters)
      let counts = [asked === 'load-and-length' ? ofLength(D) : ofRate(D)]
      if (asked === 'one-load') counts = Array.from({ length: coils }, (_, k) => 3 * ((p1?.lengthMm ?? 0) / d / 3) ** (k / (coils - 1)))
      if (asked === 'rate-and-length') {
        // Where rate and length ask for the same coils: between two diameters the difference changes sign.
        const difference = ofRate(D) - ofLength(D)
        const crosses = Math.sign(difference) !== Math.sign(previous) && !Number.isNaN(previous)
        previous = difference
        if (!crosses) continue
        let [a, b] = [d * (4 + (16 * (i - 1)) / diameters), D]
        for (let k = 0; k < 60; k++) {
          D = (a + b) / 2
          if (Math.sign(ofRate(D) - ofLength(D)) === Math.sign(difference)) b = D
          else a = D
        }
        counts = [ofRate(D)]
      }
      for (const n of counts) {
        const spring = tryOne(request, wire, D, n)
        if (spring) tried.push(spring)
      }
    }
  }
  return tried
}

const least = (values: readonly number[]) => values.reduce((a, b) => (b < a ? b : a), Infinity)
const GRIDS: Readonly<Record<Asked, Grid>> = {
  'two-loads': { diameters: 600, coils: 1 }, 'load-and-rate': { diameters: 600, coils: 1 }, 'load-and-length': { diameters: 600, coils: 1 },
  'one-load': { diameters: 40, coils: 40 }, 'rate-and-length': { diameters: 600, coils: 1 },
}

it.each(ASKED)('no spring of a dense grid is lighter or less stressed than the best by more than 0.1 %, in 30 requests that can be met: %s', (asked) => {
  fc.assert(fc.property(extensionAsks(asked), ({ wire, request }) => {
    const wires = wiresNear(wire)
    const tried = tryGrid(asked, request, wires, GRIDS[asked])
    fc.pre(tried.length > 0)
    const best = (objective: 'mass' | 'stress') => sizeSpring({ ...request, limit: 1 }, wires, { objective, explainConflict: false }).designs[0]?.objectiveValue ?? Infinity
    expect(best('mass')).toBeLessThanOrEqual(least(tried.map(spring => spring.massG)) * 1.001)
    expect(best('stress')).toBeLessThanOrEqual(least(tried.map(spring => spring.stressMpa)) * 1.001)
  }), { numRuns: 30, seed: 31 })
}, 120_000)

it('finds springs beyond 200 mm, where no diameter tolerance is counted and a wide bore lets them in again', () => {
  // 12 mm wire, grade 3: up to 200 mm the tolerance of 6.6 mm keeps all over 195.4 mm out of a bore of 214 mm.
  const wire = { id: 'thick', material: 'EN10270-1-SM' as const, wireDiameterMm: 12 }
  const spring: ExtensionInput = {
    kind: 'extension', material: wire.material, wireDiameterMm: 12, meanDiameterMm: 200.5, bodyCoils: 10, initialTensionN: 60, toleranceGrade: 3, fit: { boreMm: 214 },
  }
  const { insideHooksFreeLengthMm: L0, rateNPerMm: R } = evaluateExtension(spring)
  const points = [50, 200].map(pull => ({ lengthMm: L0 + pull, forceN: 60 + R * pull }))
  const byHand = evaluateExtension({ ...spring, points: points.map(({ lengthMm }) => ({ lengthMm })) })
  expect(byHand.checks.filter(check => !check.ok && check.severity === 'stop')).toEqual([])
  const [best] = sizeSpring({ kind: 'extension', points, toleranceGrade: 3, fit: { boreMm: 214 } }, [wire], { explainConflict: false }).designs
  expect(best?.meanDiameterMm).toBeGreaterThan(200)
  expect(best?.objectiveValue).toBeLessThanOrEqual(byHand.massG)
})
