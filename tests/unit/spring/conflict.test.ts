import { describe, expect, it } from 'vitest'
import { describeConflict, sizeSpring, type SpringSizeRequest } from '#shared/spring'
import { searchOf } from '../../../shared/spring/sizing/kinds'
import { writeNumber } from '../../../shared/spring/sizing/requirement-paths'
import { isFeasible } from '../../../shared/spring/sizing/search-wires'
import type { DroppableRequirement } from '../../../shared/spring/sizing/kind-search'
import { EN_CODES, makeWires } from './springs'

const wires = makeWires(...EN_CODES).filter((_, i) => i % 3 === 0)

/** Requests that no wire meets, of every kind, each for a reason of its own. */
const IMPOSSIBLE: readonly (readonly [string, SpringSizeRequest, readonly string[]])[] = [
  ['a bore and a rod too near each other for the load', { kind: 'compression', points: [{ lengthMm: 40, forceN: 50 }, { lengthMm: 30, forceN: 100 }], fit: { boreMm: 14, rodMm: 12, maxFreeLengthMm: 90 }, temperatureC: 60 }, ['fit.boreMm', 'fit.rodMm']],
  ['too long a life in a narrow bore', { kind: 'compression', points: [{ lengthMm: 40, forceN: 50 }, { lengthMm: 30, forceN: 100 }], fit: { boreMm: 9, maxFreeLengthMm: 60 }, duty: { cycles: 1e7 } }, ['duty.cycles', 'fit.boreMm']],
  ['heat that no wire bears', { kind: 'compression', points: [{ lengthMm: 40, forceN: 50 }], temperatureC: 400, fit: { boreMm: 40 } }, ['temperatureC']],
  ['too little room when solid', { kind: 'compression', points: [{ lengthMm: 40, forceN: 50 }, { lengthMm: 30, forceN: 100 }], fit: { maxSolidLengthMm: 4, boreMm: 60 }, coilStep: 0.25, diameterStepMm: 0.1 }, ['fit.maxSolidLengthMm']],
  ['a pull too strong for the bore', { kind: 'extension', points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 80, forceN: 60 }], fit: { boreMm: 6 }, temperatureC: 50 }, ['fit.boreMm']],
  ['a long hook-to-hook length in too short a room', { kind: 'extension', points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 80, forceN: 60 }], fit: { maxFreeLengthMm: 12 } }, ['fit.maxFreeLengthMm']],
  ['a body between a rod and a bore', { kind: 'torsion', points: [{ angleDeg: 20, momentNmm: 200 }, { angleDeg: 90, momentNmm: 900 }], fit: { rodMm: 12, boreMm: 17 }, legs: [{ lengthMm: 30, form: 'straight' }, { lengthMm: 30, form: 'straight' }] }, ['fit.rodMm', 'fit.boreMm']],
]

function subsets<T>(list: readonly T[], size: number): T[][] {
  if (size === 0) return [[]]
  return list.flatMap((item, i) => subsets(list.slice(i + 1), size - 1).map(rest => [item, ...rest]))
}

/** The requirements of a request, and the question whether some of them alone, with what cannot be left out, still clash. */
function partsOf(request: SpringSizeRequest): { paths: readonly string[], anchors: readonly string[], clash: (kept: readonly string[]) => boolean } {
  const parts = <R extends SpringSizeRequest>(asked: R, list: readonly { path: string, without: (r: R) => R }[], anchors: readonly string[]) => ({
    paths: list.map(({ path }) => path), anchors,
    clash: (kept: readonly string[]) => !isFeasible(list.reduce((r, { path, without }) => (kept.includes(path) ? r : without(r)), asked), wires),
  })
  switch (request.kind) {
    case 'compression': return parts(request, searchOf('compression').listRequirements(request) as readonly DroppableRequirement<'compression'>[], searchOf('compression').anchorPaths(request))
    case 'extension': return parts(request, searchOf('extension').listRequirements(request), searchOf('extension').anchorPaths(request))
    case 'torsion': return parts(request, searchOf('torsion').listRequirements(request), searchOf('torsion').anchorPaths(request))
  }
}

describe.each(IMPOSSIBLE)('%s', (_, request, expected) => {
  const result = sizeSpring(request, wires)
  const conflict = result.conflict ?? { requirements: [], changes: [] }

  it('is impossible, and says what stands in the way', () => {
    expect(result.designs).toEqual([])
    expect(result.searched.feasibleWires).toBe(0)
    expect(conflict.requirements).toEqual(expect.arrayContaining([...expected]))
  })

  it('names a set that clashes, and no smaller set does', () => {
    const { paths, anchors, clash } = partsOf(request)
    const isWhole = (kept: readonly string[]) => anchors.length > 0 || kept.some(path => path.startsWith('points.'))
    // What clashes whatever the spring must do is named without the loads.
    const named = conflict.requirements.filter(path => paths.includes(path))
    const whole = isWhole(named) ? named : [...named, ...paths.filter(path => path.startsWith('points.')).slice(0, 1)]
    expect(clash(whole)).toBe(true)
    for (let size = 0; size < named.length; size++) {
      for (const fewer of subsets(paths, size)) if (isWhole(fewer)) expect(clash(fewer), fewer.join(', ')).toBe(false)
    }
  })

  it('gives changes of which each admits a spring, the least first, and none that is much too large', () => {
    expect(conflict.changes.length).toBeGreaterThan(0)
    const shares = conflict.changes.map(({ from, to }) => Math.abs(to / from - 1))
    expect([...shares].sort((a, b) => a - b)).toEqual(shares)
    for (const { path, from, to, design } of conflict.changes) {
      const changed = sizeSpring(writeNumber(request, path, to), wires, { explainConflict: false })
      expect(changed.designs[0], path).toEqual(design)
      expect(design.evaluation.checks.filter(check => !check.ok && check.severity === 'stop'), path).toEqual([])
      // A limit of the fit gives way in one direction: a hundredth of the way less, or one in the fourth figure, is not enough.
      const less = Math.max(Math.abs(from - to) * 0.01, 1.01 * 10 ** (Math.floor(Math.log10(to)) - 3))
      if (path.startsWith('fit.')) expect(isFeasible(writeNumber(request, path, to + Math.sign(from - to) * less), wires), path).toBe(false)
    }
  })

  it('says all of it in sentences with the units of the kind', () => {
    const [clash = '', ...changes] = describeConflict(conflict, request)
    expect(clash).toMatch(/^No spring can be made/)
    expect(changes).toHaveLength(conflict.changes.length)
    for (const words of [clash, ...changes]) expect(words).not.toMatch(/undefined|NaN|points\.|fit\./)
    if (request.kind === 'torsion') expect(changes.join(' ')).toMatch(/N mm|mm/)
  })
})
