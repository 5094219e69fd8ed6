import { describe, expect, it } from 'vitest'
import { rateNPerMm } from '#shared/spring'
import { rateOfOneCoil, torsionCalibration } from './calculix'

/*
 * The rate formula against an independent program: CalculiX, three-node beams along the helix. It fails, and does not skip,
 * where `ccx` is absent (Debian package calculix-ccx).
 *
 * What is explained:
 * - the program's round beam twists too much: measured on a straight bar in this same test and taken out;
 * - the pitch angle, which G d^4/(8 D^3 n) leaves out: open-coil theory for ends free to turn, from memory of the textbooks;
 * - the curvature of the wire, 3/(16 C^2) stiffer (Ancker and Goodier, from memory);
 * - the joints of wire and arms: two helices of different length are compared, so they cancel.
 * What is left, under half a per cent, is not explained further.
 */
const STEEL = { youngsModulusMpa: 196_500, shearModulusMpa: 81_000 } as const
const ELEMENTS_PER_TURN = 48

const HELICES = [
  { name: 'index 4', wireDiameterMm: 2, meanDiameterMm: 8, pitchMm: 2.2 },
  { name: 'index 7', wireDiameterMm: 2, meanDiameterMm: 14, pitchMm: 5 },
  { name: 'index 11.4 (the spring of Shigley, 10th ed., problem 10-3)', wireDiameterMm: 2.5, meanDiameterMm: 28.5, pitchMm: 11.63 },
  { name: 'index 12', wireDiameterMm: 2, meanDiameterMm: 24, pitchMm: 8 },
] as const

/** Rate of one coil over the simple formula's, by open-coil theory with ends free to turn, and curvature. */
function explainedRatio({ wireDiameterMm: d, meanDiameterMm: D, pitchMm: p }: (typeof HELICES)[number]): number {
  const { youngsModulusMpa: E, shearModulusMpa: G } = STEEL
  const angle = Math.atan(p / (Math.PI * D))
  const flexibility = (Math.cos(angle) ** 2 + (2 * G * Math.sin(angle) ** 2) / E) / Math.cos(angle)
  return (1 / flexibility) * (1 + 3 / (16 * (D / d) ** 2))
}

describe('rate by a CalculiX beam model', () => {
  // Inside the tests, not before them: without the program each test must fail rather than be passed over.
  let measured: number | null = null
  const calibration = () => (measured ??= torsionCalibration(2, STEEL))

  it('knows the element\'s torsion error: 2 to 3 % too much twist in a straight round bar', () => {
    expect(calibration()).toBeGreaterThan(1.02)
    expect(calibration()).toBeLessThan(1.03)
  })

  it.each(HELICES)('agrees with G d^4/(8 D^3 n) within 1 %, and within 0.5 % of what is explained: $name', (helix) => {
    const formula = rateNPerMm({ shearModulusMpa: STEEL.shearModulusMpa, ...helix, activeCoils: 1 })
    const model = calibration() * rateOfOneCoil({ ...helix, material: STEEL, elementsPerTurn: ELEMENTS_PER_TURN })
    expect(Math.abs(model / formula - 1)).toBeLessThan(0.01)
    expect(Math.abs(model / formula / explainedRatio(helix) - 1)).toBeLessThan(0.005)
  })

  it('has converged: twice the elements change the rate by less than 0.2 %', () => {
    const helix = { ...HELICES[1], material: STEEL }
    const coarse = rateOfOneCoil({ ...helix, elementsPerTurn: ELEMENTS_PER_TURN / 2 })
    const fine = rateOfOneCoil({ ...helix, elementsPerTurn: ELEMENTS_PER_TURN })
    expect(Math.abs(coarse / fine - 1)).toBeLessThan(0.002)
  })
})
