import type { MovedCompression, MovedExtension, MovedTorsion } from '#shared/spring/drawing/moved'
import type { SpringKind } from '#shared/spring/codes'

/*
 * Springs that are drawn where nobody has typed anything yet, with what `evaluateSpring` gives for them (a test compares them).
 * Written out, so that a page which only draws does not carry the whole calculation.
 */

/** A spring for 60 N at 50 mm and 150 N at 35 mm, as on the works' own sample sheet. */
export const EXAMPLE_COMPRESSION = {
  kind: 'compression',
  spring: {
    kind: 'compression', material: 'EN10270-1-SH', wireDiameterMm: 2.5, meanDiameterMm: 20, activeCoils: 8.25, totalCoils: 10.25, freeLengthMm: 60, ends: 'closed-ground', hand: 'right',
    points: [{ lengthMm: 50 }, { lengthMm: 35 }],
  },
  evaluation: {
    rateNPerMm: 6.0295, solidLengthMm: 25.871, shortestLengthMm: 29.913, allowableStressMpa: 1064,
    points: [
      { lengthMm: 50, deflectionMm: 10, forceN: 60.295, stressMpa: 196.53, correctedStressMpa: 230.42, utilisation: 0.18471 },
      { lengthMm: 35, deflectionMm: 25, forceN: 150.74, stressMpa: 491.33, correctedStressMpa: 576.04, utilisation: 0.46178 },
    ],
    tolerances: [
      { quantity: 'force1N', nominal: 60.295, plusMinus: 10.585, grade: 2, source: 'EN 15800, coefficients from memory' },
      { quantity: 'force2N', nominal: 150.74, plusMinus: 11.942, grade: 2, source: 'EN 15800, coefficients from memory' },
    ],
  },
} as const satisfies MovedCompression

/** A spring that is pulled: 22.6 N at 60 mm and 60.5 N at 80 mm inside its hooks. */
export const EXAMPLE_EXTENSION = {
  kind: 'extension',
  spring: {
    kind: 'extension', material: 'EN10270-1-SH', wireDiameterMm: 1.6, meanDiameterMm: 12, bodyCoils: 20, initialTensionN: 12, hook: { form: 'full-loop' }, hand: 'right',
    points: [{ lengthMm: 60 }, { lengthMm: 80 }],
  },
  evaluation: {
    rateNPerMm: 1.8944, bodyCoils: 20, insideHooksFreeLengthMm: 54.4, hookLengthMm: 10.4, bodyLengthMm: 33.6, initialTensionN: 12, greatestForceN: 90.545, greatestLengthMm: 95.862,
    points: [
      { lengthMm: 60, deflectionMm: 5.6, forceN: 22.609, stressMpa: 168.67, correctedStressMpa: 199.9, utilisation: 0.18195 },
      { lengthMm: 80, deflectionMm: 25.6, forceN: 60.496, stressMpa: 451.32, correctedStressMpa: 534.9, utilisation: 0.48687 },
    ],
    tolerances: [],
  },
} as const satisfies MovedExtension

/** A spring that is turned: about 300 N mm at 30 degrees and 900 N mm at 90 degrees from free. */
export const EXAMPLE_TORSION = {
  kind: 'torsion',
  spring: {
    kind: 'torsion', material: 'EN10270-1-SH', wireDiameterMm: 2, meanDiameterMm: 16, bodyCoils: 5.25, legs: [{ lengthMm: 30, form: 'tangential' }, { lengthMm: 30, form: 'tangential' }],
    hand: 'right', points: [{ angleDeg: 30 }, { angleDeg: 90 }],
  },
  evaluation: {
    rateNmmPerDeg: 9.9467, bodyCoils: 5.25, activeCoils: 5.6479, bodyLengthMm: 12.5, greatestMomentNmm: 1088.6, greatestAngleDeg: 109.44,
    points: [
      { angleDeg: 30, momentNmm: 298.4, bendingStressMpa: 379.94, correctedStressMpa: 422.91, utilisation: 0.27412, innerDiameterAtPointMm: 13.767, bodyLengthMm: 12.655 },
      { angleDeg: 90, momentNmm: 895.2, bendingStressMpa: 1139.8, correctedStressMpa: 1268.7, utilisation: 0.82237, innerDiameterAtPointMm: 13.322, bodyLengthMm: 12.965 },
    ],
    tolerances: [
      { quantity: 'moment1Nmm', nominal: 298.4, plusMinus: 29.84, grade: 2, source: 'Machinery\'s Handbook, load of torsion springs' },
      { quantity: 'moment2Nmm', nominal: 895.2, plusMinus: 89.52, grade: 2, source: 'Machinery\'s Handbook, load of torsion springs' },
    ],
  },
} as const satisfies MovedTorsion

/** An example of each kind. */
export const EXAMPLE_SPRINGS = { compression: EXAMPLE_COMPRESSION, extension: EXAMPLE_EXTENSION, torsion: EXAMPLE_TORSION } as const satisfies Record<SpringKind, unknown>

/** What the examples are drawn for, and where they are held at first: mm, or degrees from free. */
export const EXAMPLE_WORDS: Readonly<Record<SpringKind, string>> = { compression: '60 N at 50 mm and 150 N at 35 mm', extension: 'about 22 N at 60 mm and 60 N at 80 mm', torsion: 'about 300 N·mm at 30° and 900 N·mm at 90°' }
export const EXAMPLE_AT: Readonly<Record<SpringKind, number>> = { compression: 42, extension: 70, torsion: 60 }

/** The examples as they would be typed. */
export const EXAMPLE_NEEDS = {
  compression: { knows: 'two-loads', firstForce: '60', firstLength: '50', secondForce: '150', secondLength: '35' },
  extension: { knowsExtension: 'two-loads', firstForce: '22', firstLength: '60', secondForce: '60', secondLength: '80' },
  torsion: { knowsTorsion: 'two-moments', firstMoment: '300', firstAngle: '30', secondMoment: '900', secondAngle: '90', firstLeg: '30', secondLeg: '30' },
} as const
