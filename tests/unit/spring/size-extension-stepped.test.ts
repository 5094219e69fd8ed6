import fc from 'fast-check'
import { expect, it } from 'vitest'
import { evaluateExtension, getMaterial, modulusMpa, sizeSpring, type ExtensionSizeRequest, type SizingCandidate, type SizingWire } from '#shared/spring'
import { hookLengthMm } from '../../../shared/spring/mechanics/extension/hooks'
import { EXTENSION_SEARCH } from '../../../shared/spring/sizing/extension/search'
import { extensionAsks, type Asked } from './arbitrary-extension'

interface Tried {
  readonly massG: number
  readonly stressMpa: number
  readonly price: number
}

/** A price as a shop makes it: wire by the metre, batches, and no springs of a wide index. */
function priceOf({ wire, massG, wireLengthMm, meanDiameterMm }: Pick<SizingCandidate, 'wire' | 'massG' | 'wireLengthMm' | 'meanDiameterMm'>): number {
  if (meanDiameterMm / wire.wireDiameterMm > 14) return Number.NaN
  return massG * (3 + wire.wireDiameterMm) + 2 * Math.ceil(massG / 7) + 0.01 * wireLengthMm
}

const isWithin = (value: number, asked: number | undefined, share: number) => asked === undefined || Math.abs(value / asked - 1) <= share * (1 + 1e-9)

/** Every spring of the wire in whole steps that meets the request as steps allow: loads, rate and free length within 1 %, between two loads the rate within 10 %. */
function tryAll(request: ExtensionSizeRequest, wire: SizingWire, step: number): Tried[] {
  const tried: Tried[] = []
  const d = wire.wireDiameterMm
  const material = getMaterial(wire.material)
  const G = modulusMpa(material.shearModulus, d)
  const hookCoils = G / modulusMpa(material.youngsModulus, d)
  const [first, second] = request.points
  const longest = first?.lengthMm ?? (request.freeLengthMm ?? 0) * 1.01
  for (let i = Math.ceil((4 * d) / step); i * step <= 20 * d + 1e-9; i++) {
    const D = i * step
    for (let j = Math.ceil(3 / step); j * step <= longest / d; j++) {
      const bodyCoils = j * step
      const rate = (G * d ** 4) / (8 * D ** 3 * (bodyCoils + hookCoils))
      const freeLengthMm = (bodyCoils + 1) * d + 2 * hookLengthMm(request.hook?.form ?? 'full-loop', D, d)
      if (!isWithin(freeLengthMm, request.freeLengthMm, 0.01)) continue
      let initialTensionN = (231 / Math.exp((0.105 * D) / d)) * ((Math.PI * d ** 3) / (8 * D))
      if (first && second) {
        const more = second.forceN - first.forceN
        const error = (rate * (second.lengthMm - first.lengthMm) - more) / (first.forceN + second.forceN)
        if (Math.abs(error) > 0.01 * (1 + 1e-9) || !isWithin(rate, more / (second.lengthMm - first.lengthMm), 0.1)) continue
        initialTensionN = first.forceN * (1 - error) - rate * (first.lengthMm - freeLengthMm)
      } else {
        if (!isWithin(rate, request.rateNPerMm, 0.01)) continue
        if (first) initialTensionN = first.forceN - rate * (first.lengthMm - freeLengthMm)
      }
      if (initialTensionN < 0 || freeLengthMm > longest) continue
      const { checks, massG, wireLengthMm, points, initialStressMpa } = evaluateExtension({
        kind: 'extension', material: wire.material, wireDiameterMm: d, meanDiameterMm: D, bodyCoils, initialTensionN, insideHooksFreeLengthMm: freeLengthMm,
        hook: request.hook, method: request.method, duty: request.duty, toleranceGrade: request.toleranceGrade, fit: request.fit, points: request.points.map(({ lengthMm }) => ({ lengthMm })),
      })
      if (checks.some(check => !check.ok && check.severity === 'stop')) continue
      tried.push({ massG, stressMpa: points[points.length - 1]?.stressMpa ?? initialStressMpa, price: priceOf({ wire, massG, wireLengthMm, meanDiameterMm: D }) })
    }
  }
  return tried
}

const least = (values: readonly number[]) => values.reduce((a, b) => (b < a ? b : a), Infinity)

it.each<[Asked, number]>([['two-loads', 40], ['load-and-rate', 20], ['load-and-length', 20], ['one-load', 8], ['rate-and-length', 10]])(
  'finds the lightest, the least stressed and the cheapest of all springs in whole steps: %s', (asked, numRuns) => {
    const step = 0.25
    fc.assert(fc.property(extensionAsks(asked), ({ wire, request }) => {
      // Thinner wire has too few whole steps to compare, thicker ones too many.
      fc.pre(wire.wireDiameterMm >= 0.8 && wire.wireDiameterMm <= 3)
      const tried = tryAll(request, wire, step)
      fc.pre(tried.length > 0)
      const steps = { ...request, coilStep: step, diameterStepMm: step, limit: 1 }
      const best = (objective: 'mass' | 'stress' | typeof priceOf) => sizeSpring(steps, [wire], { objective, explainConflict: false }).designs[0]?.objectiveValue ?? Infinity
      expect(best('mass') / least(tried.map(spring => spring.massG))).toBeCloseTo(1, 8)
      expect(best('stress') / least(tried.map(spring => spring.stressMpa))).toBeCloseTo(1, 8)
      const cheapest = least(tried.map(spring => spring.price).filter(price => !Number.isNaN(price)))
      if (cheapest === Infinity) expect(best(priceOf)).toBe(Infinity)
      else expect(best(priceOf) / cheapest).toBeCloseTo(1, 8)
      // Of one load each diameter gives its fewest coils only.
      const every = EXTENSION_SEARCH.prepare(steps).search(wire, 'every')
      if (asked === 'one-load') expect(every.length).toBeLessThanOrEqual(tried.length)
      else expect(every).toHaveLength(tried.length)
    }), { numRuns, seed: 41 })
  }, 120_000)

it.each<[Asked, object]>([['two-loads', { coilStep: 0.5 }], ['two-loads', { diameterStepMm: 0.5 }], ['load-and-length', { coilStep: 0.5 }], ['one-load', { coilStep: 0.5 }], ['one-load', { diameterStepMm: 0.5 }]])(
  'in steps of one of the two the other makes the request exact, and nothing is lighter than without steps: %s %o', (asked, steps) => {
    let found = 0
    fc.assert(fc.property(extensionAsks(asked), ({ wire, request }) => {
      const [design] = sizeSpring({ ...request, ...steps, limit: 1 }, [wire], { explainConflict: false }).designs
      if (design?.kind !== 'extension') return
      found++
      const again = evaluateExtension(design.spring)
      expect(again.checks.filter(check => !check.ok && check.severity === 'stop')).toEqual([])
      request.points.forEach(({ forceN }, i) => expect((again.points[i]?.forceN ?? 0) / forceN).toBeCloseTo(1, 7))
      if (request.freeLengthMm !== undefined) expect(again.insideHooksFreeLengthMm / request.freeLengthMm).toBeCloseTo(1, 7)
      const size = 'coilStep' in steps ? design.totalCoils : design.meanDiameterMm
      expect(size * 2).toBeCloseTo(Math.round(size * 2), 9)
      const [free] = sizeSpring({ ...request, limit: 1 }, [wire], { explainConflict: false }).designs
      expect(free?.objectiveValue).toBeLessThanOrEqual(design.objectiveValue * 1.001)
    }), { numRuns: 150, seed: 42 })
    expect(found).toBeGreaterThan(15)
  })
