import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatForce, formatLength } from '#shared/units/format'
import { parseNumber, parseQuantity } from '#shared/units/parse'

const number = (text: string) => {
  const parsed = parseNumber(text)
  return parsed.ok ? parsed.value : parsed.fault
}
const quantity = (...args: Parameters<typeof parseQuantity>) => {
  const parsed = parseQuantity(...args)
  return parsed.ok ? parsed.value : parsed.fault
}

describe('reading a typed number', () => {
  it.each([
    ['60', 60], ['1.5', 1.5], ['1,5', 1.5], ['.125', 0.125], [',5', 0.5], ['5.', 5], ['-2.5', -2.5], ['\u22122.5', -2.5], ['+3', 3],
    ['1/2', 0.5], ['1 1/2', 1.5], ['1-1/2', 1.5], ['1½', 1.5], ['¾', 0.75], ['-1 1/4', -1.25], ['2e3', 2000], ['0,125', 0.125],
    ['1 000', 1000], ['10\u202f000\u202f000', 10_000_000], ['1 234,5', 1234.5], ['1,234.5', 1234.5], ['1.234,5', 1234.5], ['1,234,567', 1_234_567], ['1.500', 1.5],
  ])('reads %s', (text, value) => expect(number(text)).toBe(value))

  it.each([
    ['', 'empty'], ['   ', 'empty'], ['abc', 'not-a-number'], ['NaN', 'not-a-number'], ['Infinity', 'not-a-number'], ['1.2.3', 'not-a-number'],
    ['1 00', 'not-a-number'], ['12-14', 'not-a-number'], ['1/0', 'not-a-number'], ['0x10', 'not-a-number'], ['--5', 'not-a-number'], ['1,23,4', 'not-a-number'],
    ['1,500', 'two-readings'], ['12,345', 'two-readings'], ['1e999', 'out-of-range'], ['9'.repeat(60), 'not-a-number'], ['<b>5</b>', 'not-a-number'],
  ])('refuses %s', (text, fault) => expect(number(text)).toBe(fault))

  it('says both readings of a comma before three figures', () => {
    const parsed = parseNumber('1,500')
    expect(parsed.ok ? '' : parsed.message).toBe('\'1,500\' can be read in two ways. Write 1.500 or 1500.')
  })
})

describe('reading a typed quantity', () => {
  it.each([
    ['1,5 mm', 'length', 1.5], ['.125"', 'length', 3.175], ['1 1/2 in', 'length', 38.1], ['1½ inch', 'length', 38.1], ['5 thou', 'length', 0.127],
    ['2 cm', 'length', 20], ['1\'', 'length', 304.8], ['12 lbf', 'force', 53.378659383126], ['12 lb', 'force', 53.378659383126], ['1.5 kN', 'force', 1500], ['2 kgf', 'force', 19.6133],
    ['8 ozf', 'force', 2.22411080763025], ['10 lbf/in', 'rate', 1.7512683523622], ['10 lbs / in', 'rate', 1.7512683523622], ['6.03 N/mm', 'rate', 6.03], ['2e3 N', 'force', 2000],
    ['60', 'length', 60], ['12 LBF', 'force', 53.378659383126], ['60 Mm', 'length', 60], ['1 lb', 'mass', 453.59237], ['104 °F', 'temperature', 40], ['300 K', 'temperature', 26.85], ['100 ksi', 'stress', 689.4757293168],
  ] as const)('reads %s as %s', (text, kind, value) => expect(quantity(text, kind, 'metric')).toBeCloseTo(value, 9))

  it('takes a number without a unit in the units chosen', () => {
    expect(quantity('2', 'length', 'inch')).toBe(50.8)
    expect(quantity('2', 'length', 'metric')).toBe(2)
    expect(quantity('2 mm', 'length', 'inch')).toBe(2)
  })

  it.each([
    ['5 furlong', 'length', 'unknown-unit'], ['5 N', 'length', 'wrong-quantity'], ['5 kg', 'force', 'wrong-quantity'], ['5 MN', 'force', 'unknown-unit'], ['', 'length', 'empty'],
    ['mm', 'length', 'not-a-number'], ['5 mm 6', 'length', 'unknown-unit'], ['5 mm; drop table', 'length', 'unknown-unit'], ['1,500 mm', 'length', 'two-readings'], ['x'.repeat(500), 'force', 'not-a-number'],
  ] as const)('refuses %s as %s', (text, kind, fault) => expect(quantity(text, kind, 'metric')).toBe(fault))

  it('says what a kilogram would have to be to be a force', () => {
    const parsed = parseQuantity('5 kg', 'force', 'metric')
    expect(parsed.ok ? '' : parsed.message).toBe('kg is the unit of a mass; a force is asked for. For the weight of a mass write kgf.')
  })

  it('reads back what the pages write', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 1e6, noNaN: true }), fc.constantFrom('metric', 'inch'), (value, units) => {
      const length = parseQuantity(formatLength(value, units), 'length', 'metric')
      const force = parseQuantity(formatForce(value, units), 'force', 'metric')
      // half of the last place shown, in the larger unit
      expect(length.ok && Math.abs(length.value - value)).toBeLessThanOrEqual(0.0501)
      expect(force.ok && Math.abs(force.value - value)).toBeLessThanOrEqual(units === 'inch' ? 2.2242 : 0.501)
    }))
  })

  it('never answers with a value that is not finite', () => {
    fc.assert(fc.property(fc.string({ maxLength: 60, unit: fc.constantFrom(...'0123456789.,-+ /e½"mNlbfin'.split('')) }), (text) => {
      const parsed = parseQuantity(text, 'length', 'inch')
      if (parsed.ok) expect(Number.isFinite(parsed.value)).toBe(true)
      else expect(parsed.message.length).toBeGreaterThan(10)
    }), { numRuns: 2000 })
  })
})
