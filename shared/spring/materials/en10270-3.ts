import { tabulatedStrength } from './strength-models'
import type { Material } from './types'

const MEMORY = 'EN 10270-3, from memory'

/**
 * Stainless wire X10CrNi18-8, normal strength (NS), as drawn. The moduli are those after heat treatment, because every
 * spring is stress relieved; drawn wire has E 180 000 and G 70 000 MPa.
 */
export const EN10270_3_14310: Material = {
  code: 'EN10270-3-1.4310',
  name: 'Stainless wire 1.4310 (X10CrNi18-8), normal strength',
  standard: 'EN 10270-3',
  family: 'stainless',
  youngsModulus: { value: 185_000, origin: 'from memory', source: MEMORY },
  shearModulus: { value: 73_000, origin: 'from memory', source: MEMORY },
  densityKgPerM3: { value: 7900, origin: 'from memory', source: MEMORY },
  temperatureLimitC: { value: 250, origin: 'from memory', source: MEMORY },
  modulusLossPerKelvin: { value: 0.4e-3, origin: 'from memory', source: 'EN 13906-1, from memory' },
  strength: tabulatedStrength(
    // The standard has no lower bound; the thinnest preferred diameter is taken as the least.
    0.1,
    [
      { upToMm: 0.2, minimumMpa: 2200 },
      { upToMm: 0.3, minimumMpa: 2150 },
      { upToMm: 0.4, minimumMpa: 2100 },
      { upToMm: 0.5, minimumMpa: 2050 },
      { upToMm: 0.65, minimumMpa: 2000 },
      { upToMm: 0.8, minimumMpa: 1950 },
      { upToMm: 1.0, minimumMpa: 1900 },
      { upToMm: 1.25, minimumMpa: 1850 },
      { upToMm: 1.5, minimumMpa: 1800 },
      { upToMm: 1.75, minimumMpa: 1750 },
      { upToMm: 2.0, minimumMpa: 1700 },
      { upToMm: 2.5, minimumMpa: 1650 },
      { upToMm: 3.0, minimumMpa: 1600 },
      { upToMm: 3.5, minimumMpa: 1550 },
      { upToMm: 4.25, minimumMpa: 1500 },
      { upToMm: 5.0, minimumMpa: 1450 },
      { upToMm: 6.0, minimumMpa: 1400 },
      { upToMm: 7.0, minimumMpa: 1350 },
      { upToMm: 8.5, minimumMpa: 1300 },
      { upToMm: 10.0, minimumMpa: 1250 },
    ],
    'from memory',
    MEMORY,
  ),
  // 316 to 343 °C for 30 minutes: stress-relief chart of a spring maker's public technical note.
  stressRelief: { temperatureC: 330, minutes: 30, origin: 'published', source: 'stress-relief chart of a public technical note' },
  corrosionNote: 'Stainless: good in damp air, food and fresh water; salt and chlorides pit it in time.',
  resistsCorrosion: true,
}
