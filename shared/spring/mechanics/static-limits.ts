import type { StressMethod } from '../codes'
import type { MaterialFamily } from '../materials'
import { directShearFactor, stressCorrectionFactor } from './stress-factors'

/** A static limit as a fraction of tensile strength, and the factor of the stress it is compared with. */
export interface StaticLimit {
  readonly fractionOfStrength: number
  /** Multiplies the uncorrected stress before it is compared. */
  readonly stressFactor: (springIndex: number) => number
  readonly basis: string
}

type ByFamily = Readonly<Record<MaterialFamily, number>>

const one = () => 1

// EN 13906-1: tau_c <= 0.56 Rm at solid, cold coiled, uncorrected stress (from memory).
const EN_COMPRESSION: StaticLimit = {
  fractionOfStrength: 0.56,
  stressFactor: one,
  basis: '0.56 of the tensile strength, uncorrected stress (EN 13906-1)',
}
// EN 13906-2: tau <= 0.45 Rm, uncorrected stress (from memory).
const EN_EXTENSION: StaticLimit = {
  fractionOfStrength: 0.45,
  stressFactor: one,
  basis: '0.45 of the tensile strength, uncorrected stress (EN 13906-2)',
}

// Torsional yield before presetting: Shigley solutions manuals, 8th and 10th ed. (0.45, 0.35), 10th and 11th (0.50).
const NOT_PRESET: ByFamily = { 'cold-drawn-carbon': 0.45, 'tempered-steel': 0.5, 'stainless': 0.35, 'copper-alloy': 0.35 }
// After presetting the lower ends of Shigley's Table 10-6: 0.60, 0.65, 0.55 (from memory).
const PRESET: ByFamily = { 'cold-drawn-carbon': 0.6, 'tempered-steel': 0.65, 'stainless': 0.55, 'copper-alloy': 0.55 }

/**
 * The static limit of a compression spring. EN 13906-1 compares uncorrected stress. The published fractions (`wahl`) compare
 * the Wahl corrected stress before presetting and the stress with direct shear only after it, as Shigley pairs them.
 */
export function staticLimit(method: StressMethod, family: MaterialFamily, preset: boolean): StaticLimit {
  if (method === 'en13906') return EN_COMPRESSION
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
    stressFactor: springIndex => stressCorrectionFactor(method, springIndex),
    basis: `${fraction} of the tensile strength, Wahl corrected stress (Shigley, torsional yield without presetting)`,
  }
}

/** The static limit of the body of an extension spring; presetting is never counted, since its coils lie closed. */
export function extensionBodyLimit(method: StressMethod, family: MaterialFamily): StaticLimit {
  return method === 'en13906' ? EN_EXTENSION : staticLimit(method, family, false)
}

// Shigley, Table 10-7 (from memory): carbon and low-alloy steel, then austenitic steel and non-ferrous.
const HOOK_TORSION: ByFamily = { 'cold-drawn-carbon': 0.4, 'tempered-steel': 0.4, 'stainless': 0.3, 'copper-alloy': 0.3 }
const HOOK_BENDING: ByFamily = { 'cold-drawn-carbon': 0.75, 'tempered-steel': 0.75, 'stainless': 0.55, 'copper-alloy': 0.55 }

/** Greatest torsion and bending in a hook as fractions of tensile strength, by either method: EN 13906-2 leaves hooks to the maker. */
export function hookLimits(family: MaterialFamily): { readonly torsionFraction: number, readonly bendingFraction: number, readonly basis: string } {
  return { torsionFraction: HOOK_TORSION[family], bendingFraction: HOOK_BENDING[family], basis: 'Shigley, Table 10-7' }
}

// Bending yield: music and hard-drawn 0.78 (Jindal ex. 8-9), tempered 0.87, austenitic and non-ferrous 0.61 (Shigley, from memory).
const BENDING: ByFamily = { 'cold-drawn-carbon': 0.78, 'tempered-steel': 0.87, 'stainless': 0.61, 'copper-alloy': 0.61 }

/**
 * The static limit of a torsion spring in bending. EN 13906-3 compares uncorrected stress with 0.7 Rm (from memory); the
 * published fractions compare the stress at the inner fibre.
 */
export function torsionLimit(method: StressMethod, family: MaterialFamily, innerFibreFactor: (springIndex: number) => number): StaticLimit {
  if (method === 'en13906') {
    return { fractionOfStrength: 0.7, stressFactor: one, basis: '0.7 of the tensile strength, uncorrected bending stress (EN 13906-3)' }
  }
  const fraction = BENDING[family]
  return {
    fractionOfStrength: fraction,
    stressFactor: innerFibreFactor,
    basis: `${fraction} of the tensile strength, bending stress at the inner fibre (Shigley, bending yield)`,
  }
}
