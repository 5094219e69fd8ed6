import { evaluateSpring } from '../mechanics/evaluate-spring'
import type { SpringEvaluation, SpringInput } from '../mechanics/spring'
import { compressionGroups, compressionPoints } from './compression'
import { extensionGroups, extensionPoints } from './extension'
import { torsionGroups, torsionPoints } from './torsion'
import type { SheetGroup, SheetPoints, SpringSheet } from './types'
import { CAUTIONS, checkWords, KIND_TITLES, toleranceWords } from './words'

export type { FormulaRun } from './write'
export { formulaRuns, writeSheetValue } from './write'
export type { SheetCheck, SheetColumn, SheetGroup, SheetPoints, SheetRow, SheetTolerance, SpringSheet } from './types'

const ORDER = 'The data stand in the order of ISO 2162 (part 2 for compression springs, the words of part 3 for the others), from memory.'

function dataOf(spring: SpringInput): { readonly evaluation: SpringEvaluation, readonly groups: readonly SheetGroup[], readonly points: SheetPoints } {
  switch (spring.kind) {
    case 'compression': {
      const evaluation = evaluateSpring(spring)
      return { evaluation, groups: compressionGroups(spring, evaluation), points: compressionPoints(spring, evaluation) }
    }
    case 'extension': {
      const evaluation = evaluateSpring(spring)
      return { evaluation, groups: extensionGroups(spring, evaluation), points: extensionPoints(spring, evaluation) }
    }
    case 'torsion': {
      const evaluation = evaluateSpring(spring)
      return { evaluation, groups: torsionGroups(spring, evaluation), points: torsionPoints(spring, evaluation) }
    }
  }
}

/** A spring evaluated, and its data sheet: every value with its symbol, formula and basis. Page and paper print this and nothing else. */
export function sheetOf(spring: SpringInput): { readonly evaluation: SpringEvaluation, readonly sheet: SpringSheet } {
  const { evaluation, groups, points } = dataOf(spring)
  const { kind } = spring
  return {
    evaluation,
    sheet: {
      kind,
      title: KIND_TITLES[kind],
      order: ORDER,
      groups,
      points,
      checks: evaluation.checks.map(check => ({ ...check, ...checkWords(check.code, kind) })),
      tolerances: evaluation.tolerances.map(tolerance => ({ ...tolerance, ...toleranceWords(tolerance.quantity) })),
      assumptions: evaluation.assumptions,
      cautions: CAUTIONS[kind],
    },
  }
}

const FNV_OFFSET = 0x811C9DC5
const FNV_PRIME = 0x01000193

/** A number for the sheet of an address: the same spring has the same number everywhere (FNV-1a, 32 bit, of the sorted query). */
export function sheetNumber(query: Readonly<Record<string, string>>): string {
  const text = Object.keys(query).sort().flatMap(name => (query[name]?.trim() ? [`${name}=${query[name].trim()}`] : [])).join('&')
  let hash = FNV_OFFSET
  for (let at = 0; at < text.length; at += 1) hash = Math.imul(hash ^ text.charCodeAt(at), FNV_PRIME)
  return `SP-${(hash >>> 0).toString(16).toUpperCase().padStart(8, '0')}`
}
