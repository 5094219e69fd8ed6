import type { StressMethod } from '../codes'
import type { MaterialFamily } from '../materials'
import { directShearFactor } from './stress-factors'

/** A static limit as a fraction of tensile strength, and the factor of the stress it is compared with. */
export interface StaticLimit {
  readonly fractionOfStrength: number
  /** Multiplies the uncorrected stress before it is compared. */
  readonly stressFactor: (springIndex: number) => number
  readonly basis: string
}

const one = () => 1

// EN 13906-1: tau_c <= 0.56 Rm at solid, cold coiled, uncorrected stress (from memory).
const EN_LIMIT: StaticLimit = {
  fractionOfStrength: 0.56,
  stressFactor: one,
  basis: '0.56 of the tensile strength, uncorrected stress (EN 13906-1)',
}

// Torsional yield before presetting: Shigley solutions manuals, 8th and 10th ed. (0.45, 0.35), 10th and 11th (0.50).
const NOT_PRESET: Readonly<Record<MaterialFamily, number>> = { 'cold-drawn-carbon': 0.45, 'tempered-steel': 0.5, 'stainless': 0.35 }
// After presetting the lower ends of Shigley's Table 10-6: 0.60, 0.65, 0.55 (from memory).
const PRESET: Readonly<Record<MaterialFamily, number>> = { 'cold-drawn-carbon': 0.6, 'tempered-steel': 0.65, 'stainless': 0.55 }

/**
 * The static limit of a method. EN 13906-1 compares uncorrected stress. The published fractions (`wahl`) compare the Wahl
 * corrected stress before presetting and the stress with direct shear only after it, as Shigley pairs them.
 */
export function staticLimit(method: StressMethod, family: MaterialFamily, preset: boolean, correction: (springIndex: number) => number): StaticLimit {
  if (method === 'en13906') return EN_LIMIT
  if (preset) {
    const fraction = PRESET[family]
    return {
      fractionOfStrength: fraction,
      stressFactor: directShearFactor,
      basis: `${fraction} of the tensile strength after presetting, direct shear counted (Shigley, Table 10-6)`,
    }
  }
  const fraction = NOT_PRESET[family]
  return {
    fractionOfStrength: fraction,
    stressFactor: correction,
    basis: `${fraction} of the tensile strength, Wahl corrected stress (Shigley, torsional yield without presetting)`,
  }
}
