import type { MaterialCode } from '../codes'
import { getMaterial } from './catalogue'

// Preferred wire diameters, mm: published table of preferred sizes.
const PREFERRED_MM = [
  0.1, 0.12, 0.16, 0.2, 0.25, 0.3, 0.35, 0.4, 0.45, 0.5, 0.55, 0.6, 0.65, 0.7, 0.8, 0.9, 1, 1.1, 1.2, 1.4, 1.6, 1.8, 2, 2.2,
  2.5, 2.8, 3, 3.5, 4, 4.5, 5, 5.5, 6, 6.5, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16,
] as const

// Rows of the published EN 10270-1 SM table, mm.
const EN_TABULATED_MM = [
  0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1, 1.1, 1.2, 1.3, 1.4, 1.5, 1.6, 1.7, 1.8, 1.9, 2, 2.1, 2.4, 2.5, 2.6, 2.8, 3, 3.2, 3.4,
  3.5, 3.6, 3.8, 4, 4.5, 5, 5.5, 6, 6.5, 7, 7.5, 8, 8.5, 9, 9.5, 10, 10.5, 11, 12, 12.5, 13, 14, 15, 16, 17, 18, 19, 20,
] as const

// US steel wire gauge nos. 0 to 15 and music wire gauge nos. 24 to 37, inch: Machinery's Handbook, 31st ed., Tables 5 and 14.
// Steel wire gauge nos. 16 to 20 from memory.
const STEEL_GAUGE_IN = [
  0.3065, 0.2625, 0.2437, 0.2253, 0.207, 0.192, 0.177, 0.162, 0.1483, 0.135, 0.1205, 0.1055, 0.0915, 0.08, 0.072, 0.0625,
  0.054, 0.0475, 0.041, 0.0348,
] as const
const MUSIC_GAUGE_IN = [0.055, 0.059, 0.063, 0.067, 0.071, 0.075, 0.08, 0.085, 0.09, 0.095, 0.1, 0.106, 0.112, 0.118] as const

const MM_PER_INCH = 25.4
// Cold coiling stops at about 16 mm wire (scope of EN 15800).
const THICKEST_COLD_COILED_MM = 16

function inMillimetres(inches: readonly number[]): number[] {
  return inches.map(inch => Math.round(inch * MM_PER_INCH * 1e4) / 1e4)
}

/**
 * Wire diameters sold for a material, mm, thinnest first: preferred and tabulated metric sizes for EN wire, gauge sizes for
 * ASTM wire, within the material's data and what can be coiled cold.
 */
export function standardDiametersMm(code: MaterialCode): readonly number[] {
  const { min, max } = getMaterial(code).strength.rangeMm
  // Copper alloys are sold here in the preferred metric sizes (common practice, no source).
  const sizes = code.startsWith('EN') || code.startsWith('ASTM-B')
    ? [...PREFERRED_MM, ...EN_TABULATED_MM]
    : inMillimetres(code === 'ASTM-A228' ? [...MUSIC_GAUGE_IN, ...STEEL_GAUGE_IN] : STEEL_GAUGE_IN)
  const limit = Math.min(max, THICKEST_COLD_COILED_MM)
  return [...new Set(sizes)].filter(d => d >= min && d <= limit).sort((a, b) => a - b)
}
