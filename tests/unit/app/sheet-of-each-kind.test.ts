import { describe, expect, it } from 'vitest'
import { requirementSchema, type RequirementInput } from '#shared/schemas/enquiry'
import type { StoredDesign } from '#shared/schemas/quote'
import { quoteRows } from '~/utils/quote-rows'
import { requirementFacts } from '~/utils/requirement-facts'
import { keptDesign, NEEDS } from '../server/kinds'

const rowsOf = (design: StoredDesign, units: 'metric' | 'inch' = 'metric') => quoteRows(design, { units, strokes: 10_000, strokesPerMinute: 0 })
const named = (design: StoredDesign) => Object.fromEntries(rowsOf(design).map(({ name, value, limit }) => [name, `${value}|${limit}`.replaceAll('\u202f', ' ')]))
const figure = (text: string | undefined): number => Number(/-?[\d.]+/.exec((text ?? '').replace(/(\d) (?=\d{3})/g, '$1'))?.[0])

describe.each(Object.entries<RequirementInput>(NEEDS))('the sheet of a spring of the kind %s', (_kind, need) => {
  const design = keptDesign(need)

  it.each(['metric', 'inch'] as const)('has a value in every row and no row twice, in %s units', (units) => {
    const rows = rowsOf(design, units)
    expect(rows.length).toBeGreaterThan(11)
    for (const { name, value, limit } of rows) {
      expect(value, name).toMatch(/\S/)
      expect(`${value} ${limit}`, name).not.toMatch(/NaN|null|undefined|Infinity|[–—]/)
    }
    expect(new Set(rows.map(({ name }) => name)).size).toBe(rows.length)
  })

  it('says the loads that were worked out, one row each', () => {
    const loads = rowsOf(design).filter(({ symbol }) => /^[FM]_[1-9]$/.test(symbol))
    const worked = design.kind === 'torsion' ? design.evaluation.points.map(point => point.momentNmm) : design.evaluation.points.map(point => point.forceN)
    expect(loads).toHaveLength(2)
    // Loads are written to three figures or more.
    loads.forEach(({ value }, at) => expect(Math.abs(figure(value) / worked[at]! - 1)).toBeLessThan(5e-3))
  })

  it('tells an estimator what was asked, with nothing of another kind', () => {
    const facts = requirementFacts(requirementSchema.parse(need), 'metric')
    const labels = facts.map(({ label }) => label)
    expect(labels.includes('Ends')).toBe(design.kind === 'compression')
    expect(labels.includes('Hooks')).toBe(design.kind === 'extension')
    expect(labels.includes('Legs') && labels.includes('First moment')).toBe(design.kind === 'torsion')
    expect(facts.every(({ text }) => text.trim() !== '' && !/undefined|NaN/.test(text))).toBe(true)
  })
})

describe('a limit on the sheet', () => {
  it('is never rounded up to more than the spring bears', () => {
    const pull = keptDesign(NEEDS.extension)
    const twist = keptDesign(NEEDS.torsion)
    if (pull.kind !== 'extension' || twist.kind !== 'torsion') throw new Error('The designs are not of the kinds asked for.')
    const length = figure(named(pull)['Never pull beyond'])
    expect(length).toBeLessThanOrEqual(pull.evaluation.greatestLengthMm ?? 0)
    expect(length).toBeGreaterThan((pull.evaluation.greatestLengthMm ?? 0) - 0.1)
    const angle = figure(named(twist)['Never turn beyond'])
    expect(angle).toBeLessThanOrEqual(twist.evaluation.greatestAngleDeg ?? 0)
    expect(angle).toBeGreaterThan((twist.evaluation.greatestAngleDeg ?? 0) - 0.1)
  })
})
