import { describe, expect, it } from 'vitest'
import { evaluateSpring } from '#shared/spring'
import { layoutMotion } from '#shared/spring/drawing/motion'
import { EXAMPLE_SPRINGS } from '~/utils/example-spring'

describe('the examples that are drawn before anything is typed', () => {
  it.each(Object.values(EXAMPLE_SPRINGS))('say what the calculation says: $kind', (example) => {
    const evaluated = evaluateSpring(example.spring) as unknown as Record<string, unknown>
    expect(evaluateSpring(example.spring).checks.filter(check => !check.ok && check.severity !== 'note')).toEqual([])
    const compare = (written: unknown, computed: unknown): void => {
      if (typeof written === 'number') expect(computed).toBeCloseTo(written, 0)
      if (typeof written === 'number' && typeof computed === 'number') expect(Math.abs(computed / (written || 1) - (written ? 1 : 0))).toBeLessThan(1e-3)
    }
    for (const [field, value] of Object.entries(example.evaluation)) {
      if (Array.isArray(value)) {
        if (field !== 'points') continue
        value.forEach((point, i) => Object.entries(point as object).forEach(([name, one]) => compare(one, (evaluated.points as Record<string, unknown>[])[i]?.[name])))
      }
      else compare(value, evaluated[field])
    }
    expect(layoutMotion(example, { widthPx: 540, units: 'metric' })).not.toBeNull()
  })
})
