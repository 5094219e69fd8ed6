import { evaluateTorsion, type MaterialCode } from '#shared/spring'
import { bendingStressMpa, innerFibreFactor, momentAtStressNmm, momentRateNmmPerDeg } from '../../../shared/spring/mechanics/torsion/bending'
import { num, thinnestWire, type Computed, type Inputs } from './inputs'

const DEGREES_PER_RADIAN = 180 / Math.PI

/** A spring turned until its wire yields at the inner fibre, on a rod. */
function turnedToYield(material: MaterialCode, x: Inputs, legMm: number, rodMm: number) {
  const d = num(x.d)
  const spring = {
    kind: 'torsion' as const, method: 'wahl' as const, material, wireDiameterMm: d, meanDiameterMm: num(x.OD) - d, bodyCoils: num(x.body_turns), mandrelMm: rodMm,
    legs: [{ lengthMm: legMm, form: 'tangential' as const }, { lengthMm: legMm, form: 'tangential' as const }],
    materialValues: { youngsModulusMpa: num(x.E) },
  }
  const moment = num(evaluateTorsion(spring).greatestMomentNmm)
  const e = evaluateTorsion({ ...spring, points: [{ momentNmm: moment }] })
  const inside = num(e.points[0]?.innerDiameterAtPointMm)
  const turns = num(e.points[0]?.angleDeg) / 360
  return { e, d, D: spring.meanDiameterMm, moment, turns, bodyTurns: turns * (e.bodyCoils / e.activeCoils), legTurns: num(e.legDeflectionDeg) / 360, inside }
}

// The handbook's own constant, 4000 for each degree; the house computes with 3667 (theory) and 3888, so this one is put in here.
const HANDBOOK_CONSTANT = 4000

function handbookTable(x: Inputs): Computed {
  const d = num(x.d)
  const D = num(x.inside_diameter) + d
  const torque = momentAtStressNmm(num(x.design_stress), d)
  const theory = torque / momentRateNmmPerDeg('wahl', num(x.E), d, D, 1)
  return { torque, deflection_per_coil: (theory * HANDBOOK_CONSTANT) / 3888 }
}

/** Torsion springs. */
export const TORSION_EXAMPLES: Readonly<Record<string, (x: Inputs) => Computed>> = {
  // Wire of 2250 MPa by its note.
  'bhandari-10.21': (x) => {
    const D = num(x.mean_diameter)
    const allowed = (num(x.yield_fraction) * 2250) / num(x.design_factor)
    const d = thinnestWire(wire => innerFibreFactor(D / wire) * bendingStressMpa(num(x.moment), wire) <= allowed)
    return { wire_diameter: d, active_coils: (momentRateNmmPerDeg('en13906', num(x.E), d, D, 1) * DEGREES_PER_RADIAN) / num(x.rate) }
  },
  'jindal-8-9': (x) => {
    const rod = num(x.rod_diameter)
    const { e, d, D, moment, bodyTurns, legTurns, inside } = turnedToYield('ASTM-A228', x, 20, rod)
    return {
      max_moment: moment, body_deflection: bodyTurns, leg_equivalent_turns: e.legCoils, leg_rate: moment / legTurns, leg_deflection: legTurns,
      loaded_mean_diameter: inside + d, radial_clearance_free: (D - d - rod) / 2, radial_clearance_loaded: (inside - rod) / 2,
    }
  },
  'shigley-ex10-8': (x) => {
    const pin = num(x.pin_diameter)
    const { e, d, D, moment, turns, bodyTurns, inside } = turnedToYield('ASTM-A228', x, 25.4, pin)
    return {
      mean_diameter: D, index: e.springIndex, K_i: e.stressCorrectionFactor, Sut: num(e.tensileStrengthMpa), Sy: num(e.allowableStressMpa), max_moment: moment,
      body_deflection: bodyTurns, loaded_mean_diameter: inside + d, loaded_inside_diameter: inside, pin_clearance: inside - pin,
      active_turns: e.activeCoils, rate: e.rateNmmPerDeg * 360, total_deflection: turns,
    }
  },
  'mh31-table14-a': handbookTable,
  'mh31-table14-c': handbookTable,
}
