import { MATERIAL_CODES, type MaterialCode } from '../codes'
import { ASTM_A227, ASTM_A228, ASTM_A229, ASTM_A232, ASTM_A401 } from './astm'
import { ASTM_A313_302, ASTM_A313_316, ASTM_A313_631 } from './astm-a313'
import { ASTM_B159, ASTM_B197 } from './copper-alloys'
import { EN10270_1_SH, EN10270_1_SL, EN10270_1_SM } from './en10270-1'
import { EN10270_2_FDC, EN10270_2_FDSICR, EN10270_2_VDSICR } from './en10270-2'
import { EN10270_3_14310, EN10270_3_14310_HS, EN10270_3_14401, EN10270_3_14568 } from './en10270-3'
import type { Material, SourcedValue, SteppedModulus, StrengthResult } from './types'

const MATERIALS: Readonly<Record<MaterialCode, Material>> = {
  'EN10270-1-SL': EN10270_1_SL,
  'EN10270-1-SM': EN10270_1_SM,
  'EN10270-1-SH': EN10270_1_SH,
  'EN10270-2-FDC': EN10270_2_FDC,
  'EN10270-2-FDSiCr': EN10270_2_FDSICR,
  'EN10270-2-VDSiCr': EN10270_2_VDSICR,
  'EN10270-3-1.4310': EN10270_3_14310,
  'EN10270-3-1.4310-HS': EN10270_3_14310_HS,
  'EN10270-3-1.4401': EN10270_3_14401,
  'EN10270-3-1.4568': EN10270_3_14568,
  'ASTM-A228': ASTM_A228,
  'ASTM-A229': ASTM_A229,
  'ASTM-A227': ASTM_A227,
  'ASTM-A232': ASTM_A232,
  'ASTM-A401': ASTM_A401,
  'ASTM-A313-302': ASTM_A313_302,
  'ASTM-A313-316': ASTM_A313_316,
  'ASTM-A313-631': ASTM_A313_631,
  'ASTM-B159': ASTM_B159,
  'ASTM-B197': ASTM_B197,
}

/** The material of a code. */
export function getMaterial(code: MaterialCode): Material {
  return MATERIALS[code]
}

/** Every material, in the order of the codes. */
export function listMaterials(): readonly Material[] {
  return MATERIAL_CODES.map(getMaterial)
}

/** True for text that is the code of a material. */
export function isMaterialCode(text: string): text is MaterialCode {
  return (MATERIAL_CODES as readonly string[]).includes(text)
}

/**
 * Least tensile strength of the wire as delivered, MPa. Outside the diameters of the material's data the answer is the
 * reason, never an extrapolated number.
 */
export function minimumTensileStrengthMpa(material: Material, wireDiameterMm: number): StrengthResult {
  const { min, max } = material.strength.rangeMm
  if (wireDiameterMm >= min && wireDiameterMm <= max) {
    return { known: true, minimumMpa: material.strength.minimumMpa(wireDiameterMm) }
  }
  return {
    known: false,
    reason: `${material.name} is covered from ${min} to ${max} mm wire (${material.standard}); ${wireDiameterMm} mm is outside it.`,
  }
}

/** A modulus at 20 °C for a wire diameter, MPa. */
export function modulusMpa(modulus: SourcedValue | SteppedModulus, wireDiameterMm: number): number {
  if ('value' in modulus) return modulus.value
  const step = modulus.steps.find(row => wireDiameterMm <= row.upToMm)
  if (!step) throw new Error(`No modulus for a wire of ${wireDiameterMm} mm`)
  return step.valueMpa
}
