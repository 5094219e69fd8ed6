import { tabulatedStrength } from './strength-models'
import type { Material } from './types'

const MEMORY = 'EN 10270-3, from memory'
const CHART = 'stress-relief chart of a public technical note'

// The table of the standard steps at these diameters, mm.
const UP_TO_MM = [0.2, 0.3, 0.4, 0.5, 0.65, 0.8, 1, 1.25, 1.5, 1.75, 2, 2.5, 3, 3.5, 4.25, 5, 6, 7, 8.5, 10] as const

/** Least strength as drawn, MPa, by those steps. The standard has no lower bound; the thinnest preferred diameter is taken as the least. */
function asDrawn(...leastMpa: readonly number[]) {
  return tabulatedStrength(0.1, UP_TO_MM.map((upToMm, i) => ({ upToMm, minimumMpa: leastMpa[i] as number })), 'from memory', MEMORY)
}

/*
 * The moduli are those after heat treatment, because every spring is stress relieved or aged; drawn wire has about 3 to 7 % less.
 */
const common = {
  standard: 'EN 10270-3',
  family: 'stainless',
  modulusLossPerKelvin: { value: 0.4e-3, origin: 'from memory', source: 'EN 13906-1, from memory' },
  resistsCorrosion: true,
} as const

const x10CrNi188 = {
  ...common,
  youngsModulus: { value: 185_000, origin: 'from memory', source: MEMORY },
  shearModulus: { value: 73_000, origin: 'from memory', source: MEMORY },
  densityKgPerM3: { value: 7900, origin: 'from memory', source: MEMORY },
  temperatureLimitC: { value: 250, origin: 'from memory', source: MEMORY },
  // 316 to 343 °C for 30 minutes: stress-relief chart of a spring maker's public technical note.
  stressRelief: { temperatureC: 330, minutes: 30, origin: 'published', source: CHART },
  corrosionNote: 'Stainless: good in damp air, food and fresh water; salt and chlorides pit it in time.',
} as const

/** Stainless wire X10CrNi18-8, normal strength (NS). */
export const EN10270_3_14310: Material = {
  ...x10CrNi188,
  code: 'EN10270-3-1.4310',
  name: 'Stainless wire 1.4310 (X10CrNi18-8), normal strength',
  strength: asDrawn(2200, 2150, 2100, 2050, 2000, 1950, 1900, 1850, 1800, 1750, 1700, 1650, 1600, 1550, 1500, 1450, 1400, 1350, 1300, 1250),
}

/** The same wire drawn harder (HS). */
export const EN10270_3_14310_HS: Material = {
  ...x10CrNi188,
  code: 'EN10270-3-1.4310-HS',
  name: 'Stainless wire 1.4310 (X10CrNi18-8), high strength',
  strength: asDrawn(2350, 2300, 2250, 2200, 2150, 2100, 2050, 2000, 1950, 1900, 1850, 1750, 1700, 1650, 1600, 1550, 1500, 1450, 1400, 1350),
}

/** Stainless wire with molybdenum, X5CrNiMo17-12-2. */
export const EN10270_3_14401: Material = {
  ...common,
  code: 'EN10270-3-1.4401',
  name: 'Stainless wire 1.4401 (X5CrNiMo17-12-2)',
  youngsModulus: { value: 180_000, origin: 'from memory', source: MEMORY },
  shearModulus: { value: 71_000, origin: 'from memory', source: MEMORY },
  densityKgPerM3: { value: 7950, origin: 'from memory', source: MEMORY },
  temperatureLimitC: { value: 300, origin: 'from memory', source: MEMORY },
  strength: asDrawn(1725, 1700, 1675, 1650, 1625, 1600, 1575, 1550, 1500, 1450, 1400, 1350, 1300, 1250, 1225, 1200, 1150, 1125, 1075, 1050),
  stressRelief: { temperatureC: 316, minutes: 60, origin: 'published', source: CHART },
  corrosionNote: 'Stainless with molybdenum: good in food, sea air and mild chemicals; warm chlorides still pit it.',
}

/**
 * Stainless wire X7CrNiAl17-7, hardened by ageing. The strength is that as drawn: ageing adds 300 to 400 MPa (from memory), which is not
 * counted. Its static limits are those of austenitic wire, which is safe.
 */
export const EN10270_3_14568: Material = {
  ...common,
  code: 'EN10270-3-1.4568',
  name: 'Stainless wire 1.4568 (X7CrNiAl17-7)',
  youngsModulus: { value: 200_000, origin: 'from memory', source: MEMORY },
  shearModulus: { value: 78_000, origin: 'from memory', source: MEMORY },
  densityKgPerM3: { value: 7800, origin: 'from memory', source: MEMORY },
  temperatureLimitC: { value: 350, origin: 'from memory', source: MEMORY },
  strength: asDrawn(1975, 1950, 1925, 1900, 1850, 1825, 1800, 1750, 1700, 1650, 1600, 1550, 1500, 1450, 1400, 1350, 1300, 1250, 1250, 1250),
  stressRelief: { temperatureC: 482, minutes: 60, origin: 'published', source: `${CHART}, ageing` },
  corrosionNote: 'Stainless, hardened by ageing: good in damp air and fresh water; salt and chlorides pit it sooner than 1.4310.',
}
