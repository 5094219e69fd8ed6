import {
  activeCoilsForRate, bergstraesserFactor, directShearFactor, evaluateExtension, getMaterial, minimumTensileStrengthMpa, shearStressMpa, wahlFactor,
  type MaterialCode,
} from '#shared/spring'
import { simpleHookBendingMpa } from '../../../shared/spring/mechanics/extension/hooks'
import { num, thinnestWire, type Computed, type Inputs } from './inputs'

const STANDARD_GRAVITY = 9.81 // as the book takes it

const strength = (code: MaterialCode, d: number): number => {
  const result = minimumTensileStrengthMpa(getMaterial(code), d)
  if (!result.known) throw new Error(result.reason)
  return result.minimumMpa
}

/** Extension springs and their hooks. */
export const EXTENSION_EXAMPLES: Readonly<Record<string, (x: Inputs) => Computed>> = {
  // Spring balance: wire of 1570 MPa by its note, half of it allowed.
  'bhandari-10.12': (x) => {
    const C = num(x.index)
    const F = num(x.capacity) * STANDARD_GRAVITY
    const d = thinnestWire(wire => wahlFactor(C) * shearStressMpa(F, C * wire, wire) <= num(x.shear_fraction) * 1570)
    const n = activeCoilsForRate({ shearModulusMpa: num(x.G), wireDiameterMm: d, meanDiameterMm: C * d, rateNPerMm: F / num(x.scale_length) })
    // Hooks left out, as in the book: every coil works, and the closed coils are as long as they are many.
    return { wire_diameter: d, mean_diameter: C * d, active_coils: n, total_coils: n, solid_length: n * d }
  },
  // Wire by the strength formula of oil-tempered wire, direct shear counted.
  'jindal-8-2': (x) => {
    const C = num(x.index)
    const F = num(x.force)
    let low = 0.6
    let high = 10
    for (let i = 0; i < 60; i++) {
      const d = (low + high) / 2
      if (directShearFactor(C) * shearStressMpa(F, C * d, d) > num(x.shear_fraction) * strength('ASTM-A229', d)) low = d
      else high = d
    }
    const n = activeCoilsForRate({ shearModulusMpa: num(x.G), wireDiameterMm: high, meanDiameterMm: C * high, rateNPerMm: F / num(x.scale_length) })
    return { wire_diameter: high, mean_diameter: C * high, active_coils: n }
  },
  'jindal-8-3': (x) => {
    const Sut = strength('ASTM-A228', num(x.d))
    return { Sut, force_at_hook_failure: Sut / simpleHookBendingMpa(1, num(x.hook_mean_radius), num(x.d)) }
  },
  'shigley-ex10-6': (x) => {
    const d = num(x.d)
    const D = num(x.OD) - d
    const F = num(x.force)
    const e = evaluateExtension({
      kind: 'extension', material: 'ASTM-A227', wireDiameterMm: d, meanDiameterMm: D, bodyCoils: num(x.body_turns), initialTensionN: num(x.initial_tension),
      hook: { form: 'full-loop', bendRadiusMm: num(x.r1), sideBendRadiusMm: num(x.r2) }, points: [{ forceN: F }],
      materialValues: { shearModulusMpa: num(x.G), youngsModulusMpa: num(x.E) },
    })
    const [point] = e.points
    const Sut = num(e.tensileStrengthMpa)
    const bending = num(e.hookBendingStressMpa)
    const torsion = num(e.hookTorsionStressMpa)
    return {
      index: e.springIndex, K_B: bergstraesserFactor(e.springIndex), active_coils: e.activeCoils, rate: e.rateNPerMm, free_length: e.insideHooksFreeLengthMm,
      deflection: num(point?.deflectionMm), initial_stress_uncorrected: e.initialStressMpa, Sut,
      factor_body: (num(x.body_shear_yield_fraction) * Sut) / num(point?.correctedStressMpa),
      K_A: ((bending / F - 4 / (Math.PI * d * d)) * Math.PI * d ** 3) / (16 * D),
      hook_bending_stress: bending, factor_hook_bending: num(e.hookBendingLimitMpa) / bending,
      K_B_hook: torsion / shearStressMpa(F, D, d), hook_torsion_stress: torsion, factor_hook_torsion: num(e.hookTorsionLimitMpa) / torsion,
    }
  },
}
