import { activeCoilsForRate, directShearFactor, shearStressMpa, soderbergFactor, solidLengthMm, totalCoilsFor, wahlFactor } from '#shared/spring'
import { num, thinnestWire, type Computed, type Inputs } from './inputs'

/** A valve spring, and two springs one inside the other. */
export const MORE_COMPRESSION_EXAMPLES: Readonly<Record<string, (x: Inputs) => Computed>> = {
  // Wire of 1400 MPa by its note; 0.22 and 0.45 of it are the book's pulsating limit and shear yield of tempered wire.
  'bhandari-10.15': (x) => {
    const d = num(x.d)
    const D = num(x.index) * d
    const n = Math.ceil(activeCoilsForRate({ shearModulusMpa: num(x.G), wireDiameterMm: d, meanDiameterMm: D, rateNPerMm: num(x.rate) }))
    const total = totalCoilsFor('closed-ground', n)
    const exact = solidLengthMm('textbook', 'closed-ground', total, d) + (total - 1) * num(x.gap_between_coils) + num(x.force_max) / num(x.rate)
    return {
      mean_diameter: D, total_coils: total,
      // The book rounds 57.5 mm up to the next five.
      free_length: Math.ceil(exact / 5) * 5,
      factor_of_safety: soderbergFactor({
        meanStressMpa: directShearFactor(D / d) * shearStressMpa((num(x.force_max) + num(x.force_min)) / 2, D, d),
        amplitudeMpa: wahlFactor(D / d) * shearStressMpa((num(x.force_max) - num(x.force_min)) / 2, D, d),
        pulsatingLimitMpa: 0.22 * 1400, shearYieldMpa: 0.45 * 1400,
      }),
    }
  },
  // Equal index and stress: the wires are as C to C - 2, and the loads share as their squares.
  'bhandari-10.17': (x) => {
    const C = num(x.index)
    const outer = (C / (C - 2)) ** 2
    const forceOuter = (num(x.force) * outer) / (outer + 1)
    const forceInner = num(x.force) - forceOuter
    const wire = (force: number) => thinnestWire(d => wahlFactor(C) * shearStressMpa(force, C * d, d) <= num(x.shear_stress))
    const d1 = wire(forceOuter)
    const d2 = wire(forceInner)
    const n1 = activeCoilsForRate({ shearModulusMpa: num(x.G), wireDiameterMm: d1, meanDiameterMm: C * d1, rateNPerMm: forceOuter / num(x.deflection) })
    return { force_outer: forceOuter, force_inner: forceInner, wire_outer: d1, wire_inner: d2, mean_outer: C * d1, mean_inner: C * d2, active_outer: Math.ceil(n1) }
  },
}
