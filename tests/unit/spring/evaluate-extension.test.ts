import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluateExtension, shearStressMpa, type ExtensionInput } from '#shared/spring'
import { EvaluateRequestSchema, EvaluateResponseSchema } from '#shared/schemas/spring'
import { HOOK_FORMS } from '#shared/spring/codes'
import { EXTENSION_CHECKS } from '../../../shared/spring/mechanics/extension/checks'
import { bodyLengthMm, hookLengthMm } from '../../../shared/spring/mechanics/extension/hooks'
import { greatestInitialStressMpa, leastInitialStressMpa } from '../../../shared/spring/mechanics/extension/initial-tension'

/** A spring that passes every check: 1.6 mm on 12 mm, 20 coils, 12 N initial tension. */
function makeSpring(overrides: Partial<ExtensionInput> = {}): ExtensionInput {
  return {
    kind: 'extension', material: 'EN10270-1-SH', wireDiameterMm: 1.6, meanDiameterMm: 12, bodyCoils: 20, initialTensionN: 12, hook: { form: 'full-loop' },
    points: [{ lengthMm: 60 }, { lengthMm: 75 }], ...overrides,
  }
}
const failed = (input: ExtensionInput, severity = 'stop') => evaluateExtension(input).checks.filter(c => !c.ok && c.severity === severity).map(c => c.code)

const WIDE_HOOKS: Partial<ExtensionInput> = { method: 'wahl', meanDiameterMm: 8, initialTensionN: 27, hook: { form: 'full-loop', bendRadiusMm: 60, sideBendRadiusMm: 60 } }

/** One change each that breaks a check and no other, and a neighbour of it that breaks none. */
const BROKEN: Readonly<Record<string, { breaks: Partial<ExtensionInput>, holds: Partial<ExtensionInput> }>> = {
  'wire-range': { breaks: { material: 'EN10270-1-SL', wireDiameterMm: 0.9, meanDiameterMm: 7, initialTensionN: 3, points: [] }, holds: { material: 'EN10270-1-SL', wireDiameterMm: 1, meanDiameterMm: 7, initialTensionN: 5, points: [] } },
  'index': { breaks: { meanDiameterMm: 6.3, initialTensionN: 30, points: [] }, holds: { meanDiameterMm: 6.5, initialTensionN: 30, points: [] } },
  'coils': { breaks: { bodyCoils: 2.9, points: [{ forceN: 30 }] }, holds: { bodyCoils: 3, points: [{ forceN: 30 }] } },
  'order': { breaks: { points: [{ lengthMm: 50 }] }, holds: { points: [{ lengthMm: 54.4 }] } },
  'initial-tension': { breaks: { initialTensionN: 18 }, holds: { initialTensionN: 16 } },
  // By the textbook method at index 5 the body (0.45/1.3105 of 2060 MPa, 142.2 N) binds before wide hooks do.
  'stress-working': { breaks: { ...WIDE_HOOKS, points: [{ forceN: 142.5 }] }, holds: { ...WIDE_HOOKS, points: [{ forceN: 142 }] } },
  'stress-hook-bending': { breaks: { points: [{ forceN: 93 }], hook: { form: 'full-loop', sideBendRadiusMm: 60 } }, holds: { points: [{ forceN: 90 }] } },
  'stress-hook-torsion': { breaks: { points: [{ forceN: 86 }], hook: { form: 'full-loop', sideBendRadiusMm: 1.9 } }, holds: { points: [{ forceN: 60 }], hook: { form: 'full-loop', sideBendRadiusMm: 1.9 } } },
  'hook-bend': { breaks: { points: [], hook: { form: 'full-loop', sideBendRadiusMm: 0.7 } }, holds: { points: [], hook: { form: 'full-loop', sideBendRadiusMm: 0.9 } } },
  'fatigue': { breaks: { duty: { cycles: 1e6 }, points: [{ forceN: 14 }, { forceN: 70 }] }, holds: { duty: { cycles: 1e6 }, points: [{ forceN: 14 }, { forceN: 35 }] } },
  'bore': { breaks: { fit: { boreMm: 13.85 } }, holds: { fit: { boreMm: 13.95 } } },
  'rod': { breaks: { fit: { rodMm: 10.15 } }, holds: { fit: { rodMm: 10.05 } } },
  'free-length': { breaks: { fit: { maxFreeLengthMm: 54 } }, holds: { fit: { maxFreeLengthMm: 55 } } },
  'solid-length': { breaks: { fit: { maxSolidLengthMm: 33 } }, holds: { fit: { maxSolidLengthMm: 34 } } },
  'temperature': { breaks: { temperatureC: 101 }, holds: { temperatureC: 100 } },
}

describe('checks of an extension spring', () => {
  it('pass for a sound one, in the agreed shape', () => {
    const evaluation = evaluateExtension(makeSpring())
    expect(failed(makeSpring())).toEqual([])
    expect(failed(makeSpring(), 'caution')).toEqual([])
    expect(EvaluateResponseSchema.parse(evaluation)).toEqual(evaluation)
  })

  it.each(Object.entries(BROKEN))('%s stops a spring that breaks it, and not its neighbour', (code, { breaks, holds }) => {
    expect(failed(makeSpring(breaks))).toEqual([code])
    expect(failed(makeSpring(holds))).toEqual([])
  })

  it('have a broken spring for every check that can stop', () => {
    expect(EXTENSION_CHECKS.map(check => check.code).filter(code => code !== 'surroundings' && code !== 'method').sort()).toEqual(Object.keys(BROKEN).sort())
  })

  it('say what they measure against what, in a sentence', () => {
    for (const check of evaluateExtension(makeSpring({ fit: { boreMm: 20, rodMm: 5, maxFreeLengthMm: 80, maxSolidLengthMm: 60 }, temperatureC: 40, duty: { cycles: 1e6 }, points: [{ forceN: 14 }, { forceN: 30 }] })).checks) {
      expect(check.message).toMatch(/^[A-Z0-9].*\.$/)
      expect(check.value).not.toBeNull()
      expect(check.limit).not.toBeNull()
    }
  })
})

describe('the parts of the answer', () => {
  it('follow from each other', () => {
    const e = evaluateExtension(makeSpring())
    const [p1, p2] = e.points
    expect((p2?.forceN ?? 0) - (p1?.forceN ?? 0)).toBeCloseTo(e.rateNPerMm * 15, 9)
    expect(p1?.forceN).toBeCloseTo(12 + e.rateNPerMm * (60 - e.insideHooksFreeLengthMm), 9)
    expect(e.insideHooksFreeLengthMm).toBeCloseTo(2 * (12 - 1.6) + 21 * 1.6, 9)
    expect(e.initialStressMpa).toBeCloseTo(shearStressMpa(12, 12, 1.6), 9)
    expect(e.activeCoils - e.bodyCoils).toBeCloseTo(81_500 / 206_000, 9)
    // At its greatest load one of the three limits is reached and none passed.
    const at = evaluateExtension(makeSpring({ points: [{ forceN: e.greatestForceN ?? 0 }] }))
    const shares = [(at.points[0]?.stressMpa ?? 0) / (at.allowableStressMpa ?? 1), (at.hookBendingStressMpa ?? 0) / (at.hookBendingLimitMpa ?? 1), (at.hookTorsionStressMpa ?? 0) / (at.hookTorsionLimitMpa ?? 1)]
    expect(Math.max(...shares)).toBeCloseTo(1, 9)
  })

  it('take active or body coils alike, and points by length, force or deflection', () => {
    const body = evaluateExtension(makeSpring())
    const active = evaluateExtension(makeSpring({ bodyCoils: undefined, activeCoils: body.activeCoils }))
    expect(active.bodyCoils).toBeCloseTo(20, 9)
    const [point] = body.points
    for (const one of [{ forceN: point?.forceN ?? 0 }, { deflectionMm: point?.deflectionMm ?? 0 }]) expect(evaluateExtension(makeSpring({ points: [one] })).points[0]?.lengthMm).toBeCloseTo(60, 9)
  })

  it.each(HOOK_FORMS)('give %s hooks of the length their form has, and more wire for more hook', (form) => {
    const e = evaluateExtension(makeSpring({ hook: { form }, points: [] }))
    expect(e.hookLengthMm).toBeCloseTo(hookLengthMm(form, 12, 1.6), 9)
    expect(e.insideHooksFreeLengthMm).toBeCloseTo(bodyLengthMm(20, 1.6) + 2 * e.hookLengthMm, 9)
    expect(e.wireLengthMm).toBeGreaterThan(Math.PI * 12 * 20)
    expect(e.assumptions.join(' ')).toContain(form === 'full-loop' ? 'Shigley' : 'common practice')
  })

  it('let a close-wound body double its length within the stress allowed (common practice, no source)', () => {
    const spring = makeSpring({ wireDiameterMm: 1, meanDiameterMm: 10, bodyCoils: 50, initialTensionN: 3, points: [] })
    const { insideHooksFreeLengthMm: L0, bodyLengthMm: body, greatestLengthMm } = evaluateExtension(spring)
    expect(body).toBeCloseTo(51, 9)
    const doubled = { ...spring, points: [{ lengthMm: L0 + body }] }
    expect(failed(doubled)).toEqual([])
    // A coil that opens by d is stressed by G/(pi C^2), beside the initial stress.
    const e = evaluateExtension(doubled)
    expect((e.points[0]?.stressMpa ?? 0) - e.initialStressMpa).toBeCloseTo((81_500 / (Math.PI * 100)) * (51 / e.activeCoils), 6)
    expect(e.points[0]?.utilisation).toBeLessThan(1)
    expect(greatestLengthMm).toBeGreaterThan(L0 + body)
  })

  it('say how much work a hook that breaks lets go of, where a load is given', () => {
    const [first, second] = [{ forceN: 20 }, { forceN: 40 }]
    const e = evaluateExtension(makeSpring({ points: [first, second] }))
    const pull = e.points[1]?.deflectionMm ?? 0
    // The area under the line from the initial tension of 12 N to 40 N.
    const said = e.assumptions.find(text => text.includes('breaks')) ?? ''
    expect(Number(/holds ([\d.]+) J/.exec(said)?.[1]) / ((26 * pull) / 1000)).toBeCloseTo(1, 2)
    expect(evaluateExtension(makeSpring({ points: [] })).assumptions.join(' ')).not.toContain('breaks')
  })

  it('has a sensible tension that narrows and falls with the index (Shigley: 231/exp(0.105 C) +/- 6.9 (4 - (C - 3)/6.5) MPa)', () => {
    expect(greatestInitialStressMpa(8)).toBeCloseTo(231 / Math.exp(0.84) + 6.9 * (4 - 5 / 6.5), 9)
    for (let C = 4; C < 20; C++) {
      expect(greatestInitialStressMpa(C + 1)).toBeLessThan(greatestInitialStressMpa(C))
      expect(leastInitialStressMpa(C)).toBeGreaterThan(0)
      expect(leastInitialStressMpa(C)).toBeLessThan(greatestInitialStressMpa(C))
    }
  })
})

describe('however a spring is made', () => {
  const size = (min: number, max: number) => fc.double({ min, max, noNaN: true })
  const spring = fc.record({ d: size(0.3, 8), w: size(4.5, 18), n: size(4, 60), pull: size(0.1, 2) })
    .map(({ d, w, n, pull }): ExtensionInput => ({ ...makeSpring(), wireDiameterMm: d, meanDiameterMm: d * w, bodyCoils: n, initialTensionN: d * d * 4, points: [{ forceN: d * d * (4 + 20 * pull) }], materialValues: { tensileStrengthMpa: 1800, shearModulusMpa: 81_500, youngsModulusMpa: 206_000, densityKgPerM3: 7850 } }))

  it('scales as its dimensions say: lengths by s, forces by s squared, stress and index not at all, mass by s cubed', () => {
    fc.assert(fc.property(spring, size(0.3, 3), (input, s) => {
      const small = evaluateExtension(input)
      const large = evaluateExtension({
        ...input, wireDiameterMm: input.wireDiameterMm * s, meanDiameterMm: input.meanDiameterMm * s, initialTensionN: input.initialTensionN * s * s,
        points: small.points.map(({ forceN }) => ({ forceN: forceN * s * s })),
      })
      expect(large.rateNPerMm / small.rateNPerMm).toBeCloseTo(s, 9)
      expect(large.insideHooksFreeLengthMm / small.insideHooksFreeLengthMm).toBeCloseTo(s, 9)
      expect(large.massG / small.massG).toBeCloseTo(s ** 3, 6)
      expect((large.points[0]?.stressMpa ?? 0) / (small.points[0]?.stressMpa ?? 1)).toBeCloseTo(1, 9)
      expect((large.hookBendingStressMpa ?? 0) / (small.hookBendingStressMpa ?? 1)).toBeCloseTo(1, 9)
    }), { numRuns: 200 })
  })

  it('is softer with more coils and a larger diameter, stiffer with thicker wire', () => {
    fc.assert(fc.property(spring, (input) => {
      const rate = (change: Partial<ExtensionInput>) => evaluateExtension({ ...input, ...change }).rateNPerMm
      const here = rate({})
      expect(rate({ bodyCoils: (input.bodyCoils ?? 0) * 1.1 })).toBeLessThan(here)
      expect(rate({ meanDiameterMm: input.meanDiameterMm * 1.1 }) / here).toBeCloseTo(1.1 ** -3, 9)
      expect(rate({ wireDiameterMm: input.wireDiameterMm * 1.1 }) / here).toBeCloseTo(1.1 ** 4, 9)
    }), { numRuns: 200 })
  })

  it('is answered in the agreed shape, whatever the schema lets in', () => {
    let parsed = 0
    const odd = fc.record({
      wireDiameterMm: size(0.01, 100), meanDiameterMm: size(0.02, 5000), bodyCoils: size(0.1, 1000), initialTensionN: size(0, 1e6), hook: fc.record({ form: fc.constantFrom(...HOOK_FORMS) }),
      duty: fc.record({ cycles: size(0, 1e12) }), points: fc.array(fc.oneof(fc.record({ lengthMm: size(0.01, 20_000) }), fc.record({ forceN: size(0.0001, 1e7) }), fc.record({ deflectionMm: size(0, 20_000) })), { maxLength: 6 }),
    })
    fc.assert(fc.property(odd, (body) => {
      const input = EvaluateRequestSchema.safeParse({ kind: 'extension', material: 'ASTM-B159', ...body })
      if (!input.success || input.data.kind !== 'extension') return
      parsed++
      expect(EvaluateResponseSchema.safeParse(evaluateExtension(input.data)).error).toBeUndefined()
    }), { numRuns: 500 })
    expect(parsed).toBeGreaterThan(200)
  })
})
