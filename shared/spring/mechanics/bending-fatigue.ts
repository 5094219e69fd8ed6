import { ZIMMERLI_UNPEENED, goodmanEnduranceMpa, shearUltimateMpa } from './fatigue'

// A bending limit is the torsional one over 0.577 (distortion energy; Shigley, extension springs, from memory).
const DISTORTION_ENERGY = 0.577

/** Fully reversed bending strength of steel spring wire, MPa: Goodman through Zimmerli's point in torsion, over 0.577. */
export function bendingEnduranceMpa(tensileStrengthMpa: number): number {
  const torsion = goodmanEnduranceMpa(ZIMMERLI_UNPEENED.amplitudeMpa, ZIMMERLI_UNPEENED.meanMpa, shearUltimateMpa(tensileStrengthMpa))
  return torsion / DISTORTION_ENERGY
}

/** Safety factor in bending by Goodman on the load line of the given stresses. */
export function bendingGoodmanFactor(amplitudeMpa: number, meanMpa: number, tensileStrengthMpa: number): number {
  const endurance = bendingEnduranceMpa(tensileStrengthMpa)
  return endurance > 0 ? 1 / (amplitudeMpa / endurance + meanMpa / tensileStrengthMpa) : 0
}
