import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { EvaluateRequestSchema } from '#shared/schemas/spring'
import { readSpringAddress, SpringSheetQuerySchema } from '#shared/schemas/spring/sheet'
import { SPRING_KINDS } from '#shared/spring/codes'
import { typedText, writeAddress } from '#shared/spring/sheet/address'
import { ADDRESS_PARAMS } from '#shared/spring/sheet/address-params'
import { EXAMPLE_ADDRESSES } from '#shared/spring/sheet/examples'
import { anySpring } from './springs-of-all-kinds'

describe('the address of a spring', () => {
  it('gives the very spring back that was written, whatever its kind and fields', () => {
    fc.assert(fc.property(anySpring, (spring) => {
      expect(EvaluateRequestSchema.safeParse(spring).success).toBe(true)
      const read = readSpringAddress(writeAddress(spring))
      expect(read.faults).toEqual({})
      expect(read.spring).toEqual(spring)
    }), { numRuns: 500 })
  })

  it('survives the query of a real address', () => {
    fc.assert(fc.property(anySpring, (spring) => {
      const query = writeAddress(spring)
      expect(Object.fromEntries(new URLSearchParams(new URLSearchParams(query).toString()))).toEqual(query)
    }))
  })

  it('never throws and never passes what the schema refuses, whatever the query holds', () => {
    const name = fc.oneof(fc.constantFrom(...ADDRESS_PARAMS.map(param => param.name), 'kind', '__proto__', 'constructor', 'toString', 'p7', ''), fc.string())
    const value = fc.oneof(fc.string({ maxLength: 80 }), fc.constantFrom('1e999mm', '-5mm', 'NaN', '1,500', '2.5', '2.5 furlongs', 'L', 'F', 'a90deg', 'L50N', '<script>', '../../etc', '%00', '\u0000', '9'.repeat(500)))
    const kind = fc.oneof(fc.constantFrom(...SPRING_KINDS), fc.string())
    fc.assert(fc.property(kind, fc.array(fc.tuple(name, value), { maxLength: 20 }), (kind, entries) => {
      const read = readSpringAddress(Object.fromEntries([...entries, ['kind', kind]]))
      if (read.spring) expect(EvaluateRequestSchema.safeParse(read.spring).success).toBe(true)
      else expect(Object.keys(read.faults).length + Object.keys(read.missing).length).toBeGreaterThan(0)
    }), { numRuns: 2000 })
  })

  it('names the parameter that cannot be read, and keeps the others', () => {
    const { spring, faults, kind } = readSpringAddress({ ...EXAMPLE_ADDRESSES.compression, d: '2,500', p2: '35 furlongs', ends: 'sharp', colour: 'red' })
    expect(kind).toBe('compression')
    expect(spring).toBeNull()
    expect(Object.keys(faults).sort()).toEqual(['colour', 'd', 'ends', 'p2'])
    expect(faults.d).toContain('two ways')
  })

  it('names the parameter whose value is out of bounds or clashes with another', () => {
    const { faults } = readSpringAddress({ ...EXAMPLE_ADDRESSES.compression, nt: '2', p2: 'L0mm', temperature: '-300C', bore: '5mm' })
    expect(Object.keys(faults).sort()).toEqual(['bore', 'p2', 'temperature'])
    expect(readSpringAddress({ ...EXAMPLE_ADDRESSES.compression, nt: '2' }).faults).toEqual({ nt: expect.stringContaining('cannot be less') as string })
    const gap = readSpringAddress({ ...EXAMPLE_ADDRESSES.compression, p1: '', p2: 'L50mm', p4: 'F0N' })
    expect(Object.keys(gap.faults), 'the fourth point, although the second of those given').toEqual(['p4'])
  })

  it('tells what is missing from what is wrong', () => {
    const { spring, faults, missing } = readSpringAddress({ kind: 'extension', d: '1.6mm' })
    expect(spring).toBeNull()
    expect(faults).toEqual({})
    expect(Object.keys(missing).sort()).toEqual(['D', 'F0', 'material'])
    expect(Object.keys(readSpringAddress({ kind: 'extension', material: 'ASTM-A228', d: '1.6mm', D: '12mm', F0: '3N' }).missing)).toEqual(['nb'])
  })

  it('reads inch and metric, with and without a letter before a point', () => {
    const metric = readSpringAddress(EXAMPLE_ADDRESSES.compression).spring
    const inch = readSpringAddress({ ...EXAMPLE_ADDRESSES.compression, d: '0.0984251968503937in', p1: '50mm', p2: '35' }).spring
    expect(inch?.wireDiameterMm).toBeCloseTo(2.5, 12)
    expect(inch && 'points' in inch && inch.points).toEqual(metric && 'points' in metric && metric.points)
    expect(readSpringAddress({ ...EXAMPLE_ADDRESSES.compression, p2: '120N' }).spring).toMatchObject({ points: [{ lengthMm: 50 }, { forceN: 120 }] })
    expect(readSpringAddress({ ...EXAMPLE_ADDRESSES.torsion, p1: '3lbfin' }).spring).toMatchObject({ points: [{ momentNmm: expect.closeTo(338.954487, 5) as number }, { angleDeg: 90 }] })
  })

  it.each(SPRING_KINDS)('has an example of a %s spring that passes every check of severity stop', async (kind) => {
    const { spring } = readSpringAddress(EXAMPLE_ADDRESSES[kind])
    if (!spring) throw new Error('the example cannot be read')
    const { sheetOf } = await import('#shared/spring/sheet')
    expect(sheetOf(spring).sheet.checks.filter(check => !check.ok && check.severity === 'stop')).toEqual([])
  })
})

describe('what is typed into a field', () => {
  it.each([
    ['2.5', 'length', 'metric', '2.5mm'], ['0.1', 'length', 'inch', '0.1in'], ['1 1/2', 'length', 'inch', '1 1/2in'], ['1e-2', 'length', 'metric', '1e-2 mm'], ['3 thou', 'length', 'metric', '3 thou'],
    [' 12 ', 'force', 'inch', '12lbf'], ['', 'force', 'metric', ''], ['abc', 'angle', 'metric', 'abc'], ['1,500', 'length', 'metric', '1,500'],
  ] as const)('%s as a %s in %s is held as %s', (typed, quantity, units, held) => {
    expect(typedText(typed, quantity, units)).toBe(held)
  })
})

describe('the query of a data sheet', () => {
  it('takes what the page takes, and the units to print in', () => {
    const parsed = SpringSheetQuerySchema.parse({ ...EXAMPLE_ADDRESSES.torsion, units: 'inch' })
    expect(parsed.units).toBe('inch')
    expect(parsed.spring).toEqual(readSpringAddress(EXAMPLE_ADDRESSES.torsion).spring)
    expect(parsed.query).toEqual(EXAMPLE_ADDRESSES.torsion)
  })

  it('names each parameter that is wrong or missing', () => {
    const refused = SpringSheetQuerySchema.safeParse({ kind: 'compression', d: 'x', units: 'parsec' })
    expect(refused.success).toBe(false)
    expect(refused.error?.issues.map(issue => issue.path.join('.')).sort()).toEqual(['D', 'L0', 'd', 'material', 'n', 'units'])
  })
})
