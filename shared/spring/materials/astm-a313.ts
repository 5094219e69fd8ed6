import { powerStrength, tabulatedStrength } from './strength-models'
import type { Material } from './types'

const SUPPLIER = 'wire supplier property table'
const ROUND_WIRE = 'round-wire spring material table (lb/in3 converted)'
const CHART = 'stress-relief chart of a public technical note'

const common = {
  standard: 'ASTM A313',
  family: 'stainless',
  // EN 13906-1 gives the loss for EN wire; the same is taken for like steel.
  modulusLossPerKelvin: { value: 0.4e-3, origin: 'from memory', source: 'EN 13906-1 for like steel, from memory' },
  resistsCorrosion: true,
} as const

/** What 302 and 316 wire have in common. */
const austenitic = {
  youngsModulus: { value: 193_000, origin: 'published', source: SUPPLIER },
  shearModulus: { value: 69_000, origin: 'published', source: SUPPLIER },
  densityKgPerM3: { value: 7920, origin: 'published', source: ROUND_WIRE },
  temperatureLimitC: { value: 288, origin: 'published', source: SUPPLIER },
} as const

/** Stainless 302 wire. Bands: solutions manual to Shigley, 8th ed. (kpsi form); SI form and last band from memory. */
export const ASTM_A313_302: Material = {
  code: 'ASTM-A313-302',
  name: 'Stainless wire 302',
  ...common,
  ...austenitic,
  strength: powerStrength(
    [
      { upToMm: 2.5, aMpa: 1867, m: 0.146 },
      { upToMm: 5, aMpa: 2065, m: 0.263 },
      { upToMm: 10, aMpa: 2911, m: 0.478 },
    ],
    0.3,
    'from memory',
    'solutions manual to Shigley, 8th ed. (kpsi form); SI form and the band over 5 mm from memory',
  ),
  stressRelief: { temperatureC: 330, minutes: 30, origin: 'published', source: CHART },
  corrosionNote: 'Stainless: good in damp air, food and fresh water; salt and chlorides pit it in time.',
}

// Strength by size is not published here for 316 and 631, only the band over all sizes: its least is taken for each, which is safe.
const leastOfBand = (leastMpa: number, words: string) =>
  tabulatedStrength(0.25, [{ upToMm: 10, minimumMpa: leastMpa }], 'published', `wire supplier property table: ${words} over all sizes, of which the least is taken; sizes from memory`)

/** Stainless 316 wire. */
export const ASTM_A313_316: Material = {
  ...common,
  ...austenitic,
  code: 'ASTM-A313-316',
  name: 'Stainless wire 316',
  strength: leastOfBand(758, '758 to 1689 MPa (110 to 245 kpsi)'),
  stressRelief: { temperatureC: 316, minutes: 60, origin: 'published', source: CHART },
  corrosionNote: 'Stainless with molybdenum: good in food, sea air and mild chemicals; warm chlorides still pit it.',
}

/** Stainless 17-7 PH wire, condition CH: strong once aged. Its static limits are those of austenitic wire, which is safe. */
export const ASTM_A313_631: Material = {
  ...common,
  code: 'ASTM-A313-631',
  name: 'Stainless wire 631 (17-7 PH)',
  youngsModulus: { value: 203_400, origin: 'published', source: SUPPLIER },
  shearModulus: { value: 75_800, origin: 'published', source: SUPPLIER },
  densityKgPerM3: { value: 7810, origin: 'published', source: ROUND_WIRE },
  temperatureLimitC: { value: 343, origin: 'published', source: SUPPLIER },
  strength: leastOfBand(1620, 'condition CH, 1620 to 2310 MPa (235 to 335 kpsi)'),
  stressRelief: { temperatureC: 482, minutes: 60, origin: 'published', source: `${CHART}, ageing` },
  corrosionNote: 'Stainless, hardened by ageing: good in damp air and fresh water; salt and chlorides pit it sooner than 302.',
}
