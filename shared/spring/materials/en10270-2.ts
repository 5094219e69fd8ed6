import { tabulatedStrength } from './strength-models'
import type { Material } from './types'

const MEMORY = 'EN 10270-2, from memory'
const FINEST = 'EN 10270-2 table as published by wire suppliers to 0.7 mm'

const common = {
  standard: 'EN 10270-2',
  family: 'tempered-steel',
  youngsModulus: { value: 206_000, origin: 'from memory', source: MEMORY },
  shearModulus: { value: 79_500, origin: 'from memory', source: MEMORY },
  densityKgPerM3: { value: 7850, origin: 'from memory', source: MEMORY },
  modulusLossPerKelvin: { value: 0.25e-3, origin: 'from memory', source: 'EN 13906-1, from memory' },
  resistsCorrosion: false,
} as const

const siliconChrome = {
  ...common,
  temperatureLimitC: { value: 200, origin: 'from memory', source: MEMORY },
  // 399 to 427 °C, 30 to 60 minutes: 427 °C for 30 from a stress-relief chart of a spring maker's public technical note, the range from memory.
  stressRelief: { temperatureC: 420, minutes: 30, origin: 'published', source: 'stress-relief chart of a public technical note' },
  corrosionNote: 'Alloy steel: it rusts in damp air without oil, a zinc flake finish or paint.',
} as const

/** Oil-hardened and tempered unalloyed wire for static duty. Read between its few remembered rows by the thicker one, which is safe. */
export const EN10270_2_FDC: Material = {
  ...common,
  code: 'EN10270-2-FDC',
  name: 'Oil-tempered wire FDC',
  temperatureLimitC: { value: 120, origin: 'from memory', source: MEMORY },
  strength: tabulatedStrength(
    0.5,
    [
      { upToMm: 0.7, minimumMpa: 1900 },
      { upToMm: 1, minimumMpa: 1810 },
      { upToMm: 2, minimumMpa: 1670 },
      { upToMm: 3, minimumMpa: 1580 },
      { upToMm: 4, minimumMpa: 1520 },
      { upToMm: 5, minimumMpa: 1470 },
      { upToMm: 6, minimumMpa: 1430 },
      { upToMm: 8, minimumMpa: 1360 },
      { upToMm: 10, minimumMpa: 1300 },
    ],
    'from memory',
    `${FINEST}, thicker rows from memory, to 40 MPa either way`,
  ),
  stressRelief: { temperatureC: 300, minutes: 30, origin: 'from memory', source: MEMORY },
  corrosionNote: 'Plain carbon steel: it rusts in damp air without oil, a zinc finish or paint.',
}

/** Oil-hardened and tempered silicon-chromium wire for static duty. */
export const EN10270_2_FDSICR: Material = {
  ...siliconChrome,
  code: 'EN10270-2-FDSiCr',
  name: 'Oil-tempered silicon-chromium wire FDSiCr',
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
}

/** Oil-hardened and tempered silicon-chromium wire for valve springs, which is to say for changing load. */
export const EN10270_2_VDSICR: Material = {
  ...siliconChrome,
  code: 'EN10270-2-VDSiCr',
  name: 'Oil-tempered silicon-chromium wire VDSiCr, valve quality',
  strength: tabulatedStrength(
    0.5,
    [
      { upToMm: 1, minimumMpa: 2080 },
      { upToMm: 1.6, minimumMpa: 2060 },
      { upToMm: 2, minimumMpa: 2010 },
      { upToMm: 2.5, minimumMpa: 1960 },
      { upToMm: 3, minimumMpa: 1930 },
      { upToMm: 3.5, minimumMpa: 1910 },
      { upToMm: 4, minimumMpa: 1890 },
      { upToMm: 4.5, minimumMpa: 1860 },
      { upToMm: 5, minimumMpa: 1840 },
      { upToMm: 5.6, minimumMpa: 1820 },
      { upToMm: 6, minimumMpa: 1800 },
      { upToMm: 6.5, minimumMpa: 1780 },
      { upToMm: 7, minimumMpa: 1760 },
      { upToMm: 8, minimumMpa: 1740 },
      { upToMm: 8.5, minimumMpa: 1710 },
      { upToMm: 10, minimumMpa: 1660 },
    ],
    'from memory',
    `${FINEST}, thicker rows from memory, to 20 MPa either way`,
  ),
}
