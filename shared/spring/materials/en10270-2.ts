import { tabulatedStrength } from './strength-models'
import type { Material } from './types'

const MEMORY = 'EN 10270-2, from memory'

/** Oil-hardened and tempered silicon-chromium wire for static duty. */
export const EN10270_2_FDSICR: Material = {
  code: 'EN10270-2-FDSiCr',
  name: 'Oil-tempered silicon-chromium wire FDSiCr',
  standard: 'EN 10270-2',
  family: 'tempered-steel',
  youngsModulus: { value: 206_000, origin: 'from memory', source: MEMORY },
  shearModulus: { value: 79_500, origin: 'from memory', source: MEMORY },
  densityKgPerM3: { value: 7850, origin: 'from memory', source: MEMORY },
  temperatureLimitC: { value: 200, origin: 'from memory', source: MEMORY },
  modulusLossPerKelvin: { value: 0.25e-3, origin: 'from memory', source: 'EN 13906-1, from memory' },
  strength: tabulatedStrength(
    0.5,
    // To 0.7 mm: EN 10270-2 table as published by wire suppliers. Over 2 and to 7 mm: the static FDCrSi column of
    // GB/T 18983-2003 as published on a spring maker's page, whose grades and sizes are those of ISO 8458-3.
    // The other rows are from memory of EN 10270-2.
    [
      { upToMm: 0.7, minimumMpa: 2100 },
      { upToMm: 1.0, minimumMpa: 2100 },
      { upToMm: 1.3, minimumMpa: 2070 },
      { upToMm: 1.4, minimumMpa: 2060 },
      { upToMm: 1.6, minimumMpa: 2040 },
      { upToMm: 2.0, minimumMpa: 2000 },
      { upToMm: 2.5, minimumMpa: 1970 },
      { upToMm: 2.7, minimumMpa: 1950 },
      { upToMm: 3.0, minimumMpa: 1930 },
      { upToMm: 3.2, minimumMpa: 1900 },
      { upToMm: 3.5, minimumMpa: 1900 },
      { upToMm: 4.0, minimumMpa: 1870 },
      { upToMm: 4.2, minimumMpa: 1860 },
      { upToMm: 4.5, minimumMpa: 1850 },
      { upToMm: 4.7, minimumMpa: 1840 },
      { upToMm: 5.0, minimumMpa: 1830 },
      { upToMm: 5.6, minimumMpa: 1800 },
      { upToMm: 6.0, minimumMpa: 1780 },
      { upToMm: 6.5, minimumMpa: 1760 },
      { upToMm: 7.0, minimumMpa: 1740 },
      { upToMm: 8.0, minimumMpa: 1710 },
      { upToMm: 8.5, minimumMpa: 1700 },
      { upToMm: 10.0, minimumMpa: 1660 },
    ],
    'published',
    'EN 10270-2 to 0.7 mm, GB/T 18983-2003 FDCrSi over 2 to 7 mm, other rows from memory',
  ),
  // 427 °C for 30 minutes: stress-relief chart of a spring maker's public technical note (chrome-silicon).
  stressRelief: { temperatureC: 420, minutes: 30, origin: 'published', source: 'stress-relief chart of a public technical note' },
  corrosionNote: 'Alloy steel: it rusts in damp air without oil, a zinc flake finish or paint.',
  resistsCorrosion: false,
}
