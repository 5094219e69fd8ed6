import { powerStrength, tabulatedStrength } from './strength-models'
import type { Material } from './types'

const HANDBOOK = 'Machinery\'s Handbook, 31st ed., Table 20'
const ROUND_WIRE = 'round-wire spring material table (lb/in3 converted)'
// No loss of modulus with heat is published for these here; both stay cool in use. From memory, as an order of magnitude.
const MODULUS_LOSS = { value: 0.4e-3, origin: 'from memory', source: 'order of magnitude for copper alloys, from memory' } as const

/** Phosphor bronze wire, grade A (C51000). A and m by band from memory of Shigley, Table 10-4. */
export const ASTM_B159: Material = {
  code: 'ASTM-B159',
  name: 'Phosphor bronze wire',
  standard: 'ASTM B159',
  family: 'copper-alloy',
  youngsModulus: { value: 103_400, origin: 'published', source: HANDBOOK },
  shearModulus: { value: 41_400, origin: 'published', source: HANDBOOK },
  densityKgPerM3: { value: 8860, origin: 'published', source: ROUND_WIRE },
  temperatureLimitC: { value: 93, origin: 'published', source: 'wire supplier property table' },
  modulusLossPerKelvin: MODULUS_LOSS,
  strength: powerStrength(
    [{ upToMm: 0.6, aMpa: 1000, m: 0 }, { upToMm: 2, aMpa: 913, m: 0.028 }, { upToMm: 7.5, aMpa: 932, m: 0.064 }],
    0.1, 'from memory', 'Shigley, Table 10-4, from memory; the range of all sizes, 724 to 1000 MPa, is published',
  ),
  // It softens above 232 C (Machinery's Handbook); 175 to 205 C for 30 to 60 minutes from memory.
  stressRelief: { temperatureC: 190, minutes: 60, origin: 'from memory', source: 'common practice below the published 232 °C' },
  corrosionNote: 'Phosphor bronze: conducts, is not magnetic, good in damp air and fresh water; ammonia and mercury crack it.',
  resistsCorrosion: true,
}

/** Beryllium copper wire (C17200), pretempered; strength is the least of the published band, whatever the size. */
export const ASTM_B197: Material = {
  code: 'ASTM-B197',
  name: 'Beryllium copper wire',
  standard: 'ASTM B197',
  family: 'copper-alloy',
  youngsModulus: { value: 131_000, origin: 'published', source: `${HANDBOOK} (pretempered)` },
  shearModulus: { value: 50_000, origin: 'published', source: `${HANDBOOK} (pretempered)` },
  densityKgPerM3: { value: 8250, origin: 'published', source: ROUND_WIRE },
  temperatureLimitC: { value: 200, origin: 'from memory', source: 'from memory' },
  modulusLossPerKelvin: MODULUS_LOSS,
  strength: tabulatedStrength(
    0.1, [{ upToMm: 6, minimumMpa: 1034 }], 'published',
    'round-wire spring material table: 1034 to 1586 MPa (150 to 230 kpsi) over all sizes, of which the least is taken; sizes from memory',
  ),
  stressRelief: { temperatureC: 316, minutes: 60, origin: 'published', source: 'stress-relief chart of a public technical note; held on fixtures, since it shrinks' },
  corrosionNote: 'Beryllium copper: conducts, is not magnetic, good in damp air and sea air. Its dust harms the lungs: never grind or sand it dry.',
  resistsCorrosion: true,
}
