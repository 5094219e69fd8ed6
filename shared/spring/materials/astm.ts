import { powerStrength } from './strength-models'
import type { Material, SteppedModulus } from './types'

const SHIGLEY_10_5 = 'Shigley\'s Mechanical Engineering Design, 9th ed., Table 10-5'
const SUPPLIER = 'wire supplier property table'
const ROUND_WIRE = 'round-wire spring material table (lb/in3 converted)'
const CHART = 'stress-relief chart of a public technical note'
const CARBON_NOTE = 'Plain steel: it rusts in damp air without oil, a zinc finish or paint.'

// Table 10-5 leaves 0.81 to 0.84 mm unnamed; the thicker, lower row is taken there.
function stepped(...valuesMpa: readonly [number, number, number, number]): SteppedModulus {
  const [fine, small, medium, heavy] = valuesMpa
  return {
    steps: [
      { upToMm: 0.81, valueMpa: fine },
      { upToMm: 1.6, valueMpa: small },
      { upToMm: 3.18, valueMpa: medium },
      { upToMm: Infinity, valueMpa: heavy },
    ],
    origin: 'published',
    source: SHIGLEY_10_5,
  }
}

// EN 13906-1 gives the loss for EN wire; the same steel classes are taken for ASTM wire, from memory.
const STEEL_LOSS = { value: 0.25e-3, origin: 'from memory', source: 'EN 13906-1 for like steel, from memory' } as const
const STEEL_DENSITY = { value: 7860, origin: 'published', source: ROUND_WIRE } as const

/** Music wire. A and m: solutions manuals to Shigley, 8th and 10th ed.; range from memory. */
export const ASTM_A228: Material = {
  code: 'ASTM-A228',
  name: 'Music wire',
  standard: 'ASTM A228',
  family: 'cold-drawn-carbon',
  youngsModulus: stepped(203_400, 200_000, 196_500, 193_000),
  shearModulus: stepped(82_700, 81_700, 81_000, 80_000),
  densityKgPerM3: STEEL_DENSITY,
  temperatureLimitC: { value: 121, origin: 'published', source: SUPPLIER },
  modulusLossPerKelvin: STEEL_LOSS,
  strength: powerStrength([{ upToMm: 6.5, aMpa: 2211, m: 0.145 }], 0.1, 'published', 'solutions manuals to Shigley, 8th and 10th ed., ch. 10'),
  stressRelief: { temperatureC: 260, minutes: 30, origin: 'published', source: CHART },
  corrosionNote: CARBON_NOTE,
  resistsCorrosion: false,
}

/** Oil-tempered wire. A and m: solutions manual to Shigley, 11th ed.; Jindal example 8-2. */
export const ASTM_A229: Material = {
  code: 'ASTM-A229',
  name: 'Oil-tempered wire',
  standard: 'ASTM A229',
  family: 'tempered-steel',
  youngsModulus: { value: 196_500, origin: 'published', source: SHIGLEY_10_5 },
  shearModulus: { value: 77_200, origin: 'published', source: SHIGLEY_10_5 },
  densityKgPerM3: STEEL_DENSITY,
  temperatureLimitC: { value: 121, origin: 'published', source: SUPPLIER },
  modulusLossPerKelvin: STEEL_LOSS,
  strength: powerStrength([{ upToMm: 12.7, aMpa: 1855, m: 0.187 }], 0.5, 'published', 'solutions manual to Shigley, 11th ed., ch. 10'),
  stressRelief: { temperatureC: 290, minutes: 30, origin: 'published', source: CHART },
  corrosionNote: CARBON_NOTE,
  resistsCorrosion: false,
}

/** Hard-drawn wire. A and m: solutions manual to Shigley, 8th ed. */
export const ASTM_A227: Material = {
  code: 'ASTM-A227',
  name: 'Hard-drawn wire',
  standard: 'ASTM A227',
  family: 'cold-drawn-carbon',
  youngsModulus: stepped(198_600, 197_900, 197_200, 196_500),
  shearModulus: stepped(80_700, 80_000, 79_300, 78_600),
  densityKgPerM3: STEEL_DENSITY,
  temperatureLimitC: { value: 121, origin: 'published', source: SUPPLIER },
  modulusLossPerKelvin: STEEL_LOSS,
  strength: powerStrength([{ upToMm: 12.7, aMpa: 1783, m: 0.19 }], 0.7, 'published', 'solutions manual to Shigley, 8th ed., ch. 10'),
  stressRelief: { temperatureC: 288, minutes: 20, origin: 'published', source: CHART },
  corrosionNote: CARBON_NOTE,
  resistsCorrosion: false,
}

/** Chrome-vanadium wire. A, m and range from memory of Shigley, Table 10-4. */
export const ASTM_A232: Material = {
  code: 'ASTM-A232',
  name: 'Chrome-vanadium wire',
  standard: 'ASTM A231/A232',
  family: 'tempered-steel',
  youngsModulus: { value: 203_400, origin: 'published', source: SHIGLEY_10_5 },
  shearModulus: { value: 77_200, origin: 'published', source: SHIGLEY_10_5 },
  densityKgPerM3: STEEL_DENSITY,
  temperatureLimitC: { value: 218, origin: 'published', source: SUPPLIER },
  modulusLossPerKelvin: STEEL_LOSS,
  strength: powerStrength([{ upToMm: 11.1, aMpa: 2005, m: 0.168 }], 0.8, 'from memory', 'Shigley, Table 10-4, from memory'),
  stressRelief: { temperatureC: 427, minutes: 30, origin: 'published', source: CHART },
  corrosionNote: CARBON_NOTE,
  resistsCorrosion: false,
}

/** Chrome-silicon wire. A, m and range from memory of Shigley, Table 10-4. */
export const ASTM_A401: Material = {
  code: 'ASTM-A401',
  name: 'Chrome-silicon wire',
  standard: 'ASTM A401',
  family: 'tempered-steel',
  youngsModulus: { value: 203_400, origin: 'published', source: SHIGLEY_10_5 },
  shearModulus: { value: 77_200, origin: 'published', source: SHIGLEY_10_5 },
  densityKgPerM3: STEEL_DENSITY,
  temperatureLimitC: { value: 246, origin: 'published', source: SUPPLIER },
  modulusLossPerKelvin: STEEL_LOSS,
  strength: powerStrength([{ upToMm: 9.5, aMpa: 1974, m: 0.108 }], 1.6, 'from memory', 'Shigley, Table 10-4, from memory'),
  stressRelief: { temperatureC: 427, minutes: 30, origin: 'published', source: CHART },
  corrosionNote: CARBON_NOTE,
  resistsCorrosion: false,
}
