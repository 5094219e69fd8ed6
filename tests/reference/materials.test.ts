import { describe, expect, it } from 'vitest'
import {
  MATERIAL_CODES, getMaterial, minimumTensileStrengthMpa, modulusMpa, standardDiametersMm, staticLimit, wireDiameterToleranceMm, wireMassG, type MaterialCode,
} from '#shared/spring'
import data from './data/materials.json'

/*
 * Every value of the reference notes' wire data against the catalogue: moduli, density, heat, strength row by row, stress relief, the sizes
 * sold, the tolerance and mass of wire, and whether a value is published (a) or remembered (b).
 */
type Json = Record<string, unknown>
const materials = data.materials as unknown as (Json & { id: string, strength: Json })[]

/** Where each of ours stands in the notes; `state` picks the moduli that hold once it is finished, `rows` its column of strengths. */
const STANDS_IN: Readonly<Record<MaterialCode, { readonly id: string, readonly state?: string, readonly rows?: string }>> = {
  'EN10270-1-SL': { id: 'en10270-1-sl' },
  'EN10270-1-SM': { id: 'en10270-1-sm' },
  'EN10270-1-SH': { id: 'en10270-1-sh' },
  'EN10270-2-FDC': { id: 'en10270-2-fdc' },
  'EN10270-2-FDSiCr': { id: 'en10270-2-vdsicr', rows: 'FDSiCr' },
  'EN10270-2-VDSiCr': { id: 'en10270-2-vdsicr', rows: 'VDSiCr' },
  'EN10270-3-1.4310': { id: 'en10270-3-1.4310', state: 'heat_treated', rows: 'NS' },
  'EN10270-3-1.4310-HS': { id: 'en10270-3-1.4310', state: 'heat_treated', rows: 'HS' },
  'EN10270-3-1.4401': { id: 'en10270-3-1.4401', state: 'heat_treated' },
  'EN10270-3-1.4568': { id: 'en10270-3-1.4568', state: 'heat_treated' },
  'ASTM-A228': { id: 'astm-a228' },
  'ASTM-A229': { id: 'astm-a229' },
  'ASTM-A227': { id: 'astm-a227' },
  'ASTM-A232': { id: 'astm-a232' },
  'ASTM-A401': { id: 'astm-a401' },
  'ASTM-A313-302': { id: 'astm-a313-302' },
  'ASTM-A313-316': { id: 'astm-a313-316' },
  'ASTM-A313-631': { id: 'astm-a313-631' },
  'ASTM-B159': { id: 'astm-b159' },
  'ASTM-B197': { id: 'astm-b197', state: 'pretempered' },
}

interface Sourced { readonly value: unknown, readonly origin: string }
interface Row { readonly d: number, readonly leastMpa: number, readonly origin?: 'a' | 'b' }

function noted(code: MaterialCode) {
  const found = materials.find(one => one.id === STANDS_IN[code].id)
  if (!found) throw new Error(`No notes of ${code}`)
  return found
}
const ORIGINS: Readonly<Record<string, string>> = { a: 'published', b: 'from memory', c: 'computed' }
const originOf = (value: Sourced): string | undefined => ORIGINS[/^([abc])\b/.exec(value.origin)?.[1] ?? '']

/** A modulus of the notes at diameters that each of its steps holds for, MPa. */
function modulusRows(code: MaterialCode, name: 'E' | 'G'): { d: number, mpa: number }[] {
  const notes = noted(code)
  const { min, max } = getMaterial(code).strength.rangeMm
  const scale = notes[`${name}_GPa`] ? 1000 : 1
  const { value } = (notes[`${name}_GPa`] ?? notes[`${name}_MPa`]) as Sourced
  const state = STANDS_IN[code].state
  if (typeof value === 'number') return [min, max].map(d => ({ d, mpa: value * scale }))
  const steps = value as Record<string, number>
  if (state) return [min, max].map(d => ({ d, mpa: (steps[state] ?? Number.NaN) * scale }))
  return Object.entries(steps).flatMap(([range, number]) => {
    const [from, to] = range.startsWith('<') ? [min, Number(range.slice(1))] : range.startsWith('>') ? [Number(range.slice(1)) + 0.001, max] : range.split('-').map(Number)
    return [from, to].map(d => ({ d: d as number, mpa: number * scale }))
  })
}

/** Least strengths of the notes, MPa. */
function strengthRows(code: MaterialCode): Row[] {
  const strength = noted(code).strength
  const column = STANDS_IN[code].rows
  const least = (table: unknown, origin?: 'a' | 'b'): Row[] => Object.entries((table ?? {}) as Record<string, number | number[]>).flatMap(([size, value]) => {
    // 'VDSiCr 0.5-0.7': a grade and both ends of a range.
    const [, grade, sizes = ''] = /^(?:([A-Za-z]+) )?([\d.-]+)$/.exec(size) ?? []
    if (grade && grade !== column) return []
    const leastMpa = typeof value === 'number' ? value : value[0]!
    return sizes.split('-').map(d => ({ d: Number(d), leastMpa, ...(origin ? { origin } : {}) }))
  })
  const steps = (rows: unknown): Row[] => ((rows ?? []) as { over: number, up_to: number, min: number }[])
    .flatMap(({ over, up_to: upTo, min }) => [{ d: Math.max(over + 0.001, 0.1), leastMpa: min }, { d: upTo, leastMpa: min }])
  // The table as it is to be used, where the printed one has a slip.
  if (strength['table_use']) return least(strength['table_use'])
  if (Array.isArray(strength['table'])) return steps(strength['table'])
  if (column && strength[column]) return steps(strength[column])
  return [...least(strength['table_min']), ...least(strength['table_a'], 'a'), ...least(column === 'FDSiCr' ? undefined : strength['table_b'], 'b'), ...least(column === 'VDSiCr' ? strength['table_b_VDSiCr'] : undefined, 'b')]
}

describe.each(MATERIAL_CODES)('%s against the notes', (code) => {
  const material = getMaterial(code)
  const notes = noted(code)

  it('has the moduli of every size', () => {
    for (const [name, modulus] of [['E', material.youngsModulus], ['G', material.shearModulus]] as const) {
      const rows = modulusRows(code, name)
      expect(rows.length).toBeGreaterThanOrEqual(2)
      for (const { d, mpa } of rows) expect(modulusMpa(modulus, d), `${name} at ${d} mm`).toBeCloseTo(mpa, 6)
      const value = (notes[`${name}_GPa`] ?? notes[`${name}_MPa`]) as Sourced
      expect(modulus.origin).toBe(originOf(value))
    }
  })

  it('has the density and the greatest temperature, each marked as they are', () => {
    for (const [value, note] of [[material.densityKgPerM3, notes['density_kg_m3']], [material.temperatureLimitC, notes['temp_max_C']]] as const) {
      expect(value.value).toBe((note as Sourced).value)
      expect(value.origin).toBe(originOf(note as Sourced))
    }
  })

  it('is stress relieved within the range of heat and time', () => {
    const { C, minutes } = (notes['stress_relief'] as Sourced).value as { C: number[], minutes: number[] }
    expect(material.stressRelief.temperatureC).toBeGreaterThanOrEqual(C[0]!)
    expect(material.stressRelief.temperatureC).toBeLessThanOrEqual(C[1]!)
    expect(material.stressRelief.minutes).toBeGreaterThanOrEqual(minutes[0]!)
    expect(material.stressRelief.minutes).toBeLessThanOrEqual(minutes[1]!)
    expect(material.stressRelief.origin).toBe(originOf(notes['stress_relief'] as Sourced))
  })

  it('has the strength of every row, band or formula, and ends where they end', () => {
    const { strength } = notes
    const at = (d: number) => {
      const found = minimumTensileStrengthMpa(material, d)
      if (!found.known) throw new Error(found.reason)
      return found.minimumMpa
    }
    const range = strength['range_mm'] as [number, number] | undefined
    if (range) expect([material.strength.rangeMm.min, material.strength.rangeMm.max]).toEqual(range)
    const rows = strengthRows(code)
    for (const { d, leastMpa } of rows) expect(at(d), `${d} mm`).toBe(leastMpa)
    const bands = (strength['bands'] ?? (strength['A_MPa_mm_m'] ? [{ range_mm: range, A_MPa: strength['A_MPa_mm_m'], m: strength['m'] }] : [])) as { range_mm: [number, number], A_MPa: number, m: number }[]
    for (const { range_mm: [from, to], A_MPa: a, m } of bands) {
      for (const d of [from * 1.0001, Math.sqrt(from * to), to]) expect(at(d), `${d} mm`).toBeCloseTo(a / d ** m, 6)
    }
    if (bands.length > 0) expect([material.strength.rangeMm.min, material.strength.rangeMm.max]).toEqual([bands[0]!.range_mm[0], bands.at(-1)!.range_mm[1]])
    const all = strength['range_MPa'] as [number, number] | undefined
    if (all) for (const d of [material.strength.rangeMm.min, material.strength.rangeMm.max]) expect(at(d)).toBe(all[0])
    expect(rows.length + bands.length + (all ? 1 : 0), 'nothing was compared').toBeGreaterThan(0)
  })

  it('says where its strength is published and where it is remembered', () => {
    const { origin, source } = material.strength
    const rows = strengthRows(code)
    if (rows.some(row => row.origin === 'b') || /^b\b/.test(String(noted(code).strength['origin']))) expect(`${origin} ${source}`).toContain('from memory')
    if (/^a\b/.test(String(noted(code).strength['origin'])) && !rows.some(row => row.origin === 'b')) expect(origin).toBe('published')
  })
})

describe('the catalogue as a whole', () => {
  it('has every material of the notes but those without density, heat and stress relief', () => {
    const ours = new Set(Object.values(STANDS_IN).map(({ id }) => id))
    const left = materials.filter(({ id }) => !ours.has(id))
    expect(left.map(({ id }) => id)).toEqual(['is4454-patented', 'is4454-oil'])
    for (const one of left) expect([one['density_kg_m3'], one['temp_max_C'], one['stress_relief']], one.id).toEqual([undefined, undefined, undefined])
  })

  it('allows in shear no more than the published yield fraction without presetting', () => {
    const fractions = MATERIAL_CODES.flatMap((code) => {
      const value = (noted(code)['shear_yield_fraction_of_Sut'] as Sourced | undefined)?.value
      return value === undefined ? [] : [{ family: getMaterial(code).family, most: Array.isArray(value) ? Number(value[1]) : Number(value) }]
    })
    expect(fractions.length).toBeGreaterThanOrEqual(7)
    for (const { family, most } of fractions) expect(staticLimit('wahl', family, false).fractionOfStrength, family).toBeLessThanOrEqual(most)
  })

  it('sells the sizes of the notes, within each material’s data and what is coiled cold', () => {
    const { preferred_SI_mm: preferred, en10270_1_tabulated_mm: tabulated, us_steel_wire_gauge_in: steel, music_wire_gauge_in: music } = data.stock_diameters
    const within = (code: MaterialCode, sizes: readonly number[]) => {
      const { min, max } = getMaterial(code).strength.rangeMm
      return [...new Set(sizes)].filter(d => d >= min && d <= Math.min(max, 16)).sort((a, b) => a - b)
    }
    const inches = (values: Record<string, number>) => Object.values(values).map(inch => Math.round(inch * 25.4 * 1e4) / 1e4)
    for (const code of MATERIAL_CODES) {
      const sizes = !/^ASTM-A/.test(code) ? [...preferred.values, ...tabulated.values] : code === 'ASTM-A228' ? [...inches(steel.values), ...inches(music.values)] : inches(steel.values)
      expect(standardDiametersMm(code), code).toEqual(within(code, sizes))
    }
  })

  it('has the tolerance and the mass of wire', () => {
    for (const { d, tol } of data.wire_diameter_tolerance.EN_ISO_coiled.rows) for (const size of d) expect(wireDiameterToleranceMm(size), `${size} mm`).toBe(tol)
    // EN 10218-2 class T4: 0.015 sqrt(d), to 0.001 mm.
    for (const d of [0.8, 1, 2, 4, 10]) expect(wireDiameterToleranceMm(d)).toBeCloseTo(0.015 * Math.sqrt(d), 3)
    for (const [size, words] of Object.entries(data.wire_mass.check).filter(([name]) => name.endsWith('mm'))) {
      expect(wireMassG(Number.parseFloat(size), 1e6, 7850) / 1000, size).toBeCloseTo(Number.parseFloat(String(words)), 2)
    }
  })
})
