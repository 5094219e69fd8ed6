import fc from 'fast-check'
import { expect, it } from 'vitest'
import { evaluateCompression, getMaterial, modulusMpa, sizeSpring, totalCoilsFor, type CompressionSizeRequest, type SizingCandidate, type SizingWire } from '#shared/spring'
import { EN_CODES, makeWires } from './springs'
import { oneLoad, twoLoads } from './arbitrary-compression'

const catalogue = makeWires(...EN_CODES)

interface Tried {
  readonly massG: number
  readonly price: number
}

/** A price as a shop makes it: wire by the metre with coil ends in whole coils, batches, and no springs of a wide index. */
function priceOf({ wire, massG, wireLengthMm, meanDiameterMm }: Pick<SizingCandidate, 'wire' | 'massG' | 'wireLengthMm' | 'meanDiameterMm'>): number {
  if (meanDiameterMm / wire.wireDiameterMm > 14) return Number.NaN
  return massG * (3 + wire.wireDiameterMm) + 2 * Math.ceil(massG / 7) + 0.01 * wireLengthMm
}

/** Every spring of whole steps whose loads are within 1 % and whose rate is within 10 %, evaluated as a caller would. */
function tryAll(request: CompressionSizeRequest, wires: readonly SizingWire[], step: number): Tried[] {
  const tried: Tried[] = []
  const [first, second] = request.points
  if (!first) return tried
  for (const wire of wires) {
    const d = wire.wireDiameterMm
    const k = (modulusMpa(getMaterial(wire.material).shearModulus, d) * d ** 4) / 8
    for (let D = Math.ceil((4 * d) / step) * step; D <= 20 * d + 1e-9; D += step) {
      for (let n = 2; n <= Math.min(first.lengthMm, second?.lengthMm ?? Infinity) / d; n += step) {
        const rate = k / (D ** 3 * n)
        let freeLengthMm = first.lengthMm + first.forceN / rate
        if (second) {
          const asked = (second.forceN - first.forceN) / (first.lengthMm - second.lengthMm)
          const error = (rate * (first.lengthMm - second.lengthMm) - (second.forceN - first.forceN)) / (first.forceN + second.forceN)
          if (Math.abs(error) > 0.01 || Math.abs(rate / asked - 1) > 0.1) continue
          freeLengthMm = first.lengthMm + (first.forceN * (1 - error)) / rate
        }
        const { checks, massG, wireLengthMm } = evaluateCompression({
          ...request, material: wire.material, wireDiameterMm: d, meanDiameterMm: D, activeCoils: n, totalCoils: totalCoilsFor(request.ends ?? 'closed-ground', n),
          freeLengthMm, points: request.points.map(({ lengthMm }) => ({ lengthMm })),
        })
        if (checks.some(check => !check.ok && check.severity === 'stop')) continue
        tried.push({ massG, price: priceOf({ wire, massG, wireLengthMm, meanDiameterMm: D }) })
      }
    }
  }
  return tried
}

const least = (values: readonly number[]) => values.reduce((a, b) => (b < a ? b : a), Infinity)

/** Some thicknesses near the one whose spring is asked for. */
const wiresNear = ({ wireDiameterMm: d }: SizingWire) => catalogue.filter(wire => wire.wireDiameterMm > d * 0.85 && wire.wireDiameterMm < d * 1.18 && wire.wireDiameterMm < 6)

it.each([['two loads', twoLoads, 0.5, 60], ['one load', oneLoad, 1, 15]] as const)('finds no cheaper and no lighter spring of %s by trying every step of every wire', (_, arbitrary, step, numRuns) => {
  let found = 0
  fc.assert(fc.property(arbitrary, ({ wire, request }) => {
    // Thinner wire has too few whole half millimetres to compare, thicker ones too many.
    fc.pre(wire.wireDiameterMm >= 1 && wire.wireDiameterMm <= 5)
    const wires = wiresNear(wire)
    const asked = { ...request, coilStep: step, diameterStepMm: step, limit: 1 }
    const tried = tryAll(request, wires, step)
    const lightest = sizeSpring(asked, wires, { explainConflict: false })
    const cheapest = sizeSpring(asked, wires, { objective: priceOf, explainConflict: false })
    expect(lightest.designs.length > 0, 'a spring exists').toBe(tried.length > 0)
    if (tried.length === 0) return
    found++
    expect(lightest.designs[0]?.objectiveValue ?? Number.NaN).toBeCloseTo(least(tried.map(spring => spring.massG)), 8)
    const prices = tried.map(spring => spring.price).filter(price => !Number.isNaN(price))
    expect(cheapest.designs.length).toBe(prices.length > 0 ? 1 : 0)
    if (prices.length > 0) expect(cheapest.designs[0]?.objectiveValue ?? Number.NaN).toBeCloseTo(least(prices), 8)
  }), { numRuns })
  expect(found).toBeGreaterThan(5)
}, 120_000)
