import type { CoilHand, CompressionEnds, HookForm, LegForm, SpringKind, StressMethod } from '../codes'
import type { SheetQuantity } from './types'

export const KIND_TITLES: Readonly<Record<SpringKind, string>> = { compression: 'Compression spring', extension: 'Extension spring', torsion: 'Torsion spring' }
export const ENDS: Readonly<Record<CompressionEnds, string>> = { 'closed-ground': 'closed and ground', 'closed': 'closed, not ground', 'open': 'open, not ground', 'open-ground': 'open and ground' }
export const HOOKS: Readonly<Record<HookForm, string>> = { 'full-loop': 'full loops', 'half-loop': 'half loops', 'crossover-loop': 'crossed loops', 'extended-hook': 'extended hooks' }
export const LEGS: Readonly<Record<LegForm, string>> = { straight: 'straight, along the axis', tangential: 'tangential' }
export const HANDS: Readonly<Record<CoilHand, string>> = { left: 'left', right: 'right' }
export const METHODS: Readonly<Record<StressMethod, string>> = { en13906: 'EN 13906', wahl: 'Wahl and published fractions' }

interface CheckWords { readonly name: string, readonly unit: SheetQuantity | null }

/** Names of the checks, and what their value and limit are measured in where that does not depend on the kind. */
const CHECKS: Readonly<Record<string, CheckWords>> = {
  'wire-range': { name: 'Wire covered by its standard', unit: 'wire' },
  'index': { name: 'Spring index', unit: 'ratio' },
  'coils': { name: 'Number of coils', unit: 'coils' },
  'order': { name: 'Working points', unit: 'length' },
  'clearance': { name: 'Gap left at the shortest length', unit: 'length' },
  'stress-solid': { name: 'Stress when solid', unit: 'stress' },
  'stress-working': { name: 'Stress at the greatest load', unit: 'stress' },
  'stress-hook-bending': { name: 'Bending in the hooks', unit: 'stress' },
  'stress-hook-torsion': { name: 'Torsion at the hooks', unit: 'stress' },
  'hook-bend': { name: 'Tightest bend of the hooks', unit: 'length' },
  'initial-tension': { name: 'Initial tension', unit: 'stress' },
  'fatigue': { name: 'Fatigue', unit: 'ratio' },
  'bore': { name: 'Room in the bore', unit: 'length' },
  'rod': { name: 'Room over the rod', unit: 'length' },
  'buckling': { name: 'Buckling', unit: 'length' },
  'solid-length': { name: 'Solid or closed length', unit: 'length' },
  'free-length': { name: 'Free length', unit: 'length' },
  'temperature': { name: 'Temperature', unit: 'temperature' },
  'resonance': { name: 'Resonance', unit: 'frequency' },
  'impact': { name: 'Stress of quick strokes', unit: 'stress' },
  'peening': { name: 'Shot peening', unit: 'length' },
  'tangling': { name: 'Tangling in bulk', unit: 'length' },
  'surroundings': { name: 'Surroundings', unit: null },
  'method': { name: 'Limits and strengths of one set', unit: null },
  'winding': { name: 'Direction of the load', unit: null },
}

/** A check's name and unit; one that is not known here keeps its code, and its sentence says the units. */
export function checkWords(code: string, kind: SpringKind): CheckWords {
  const words = Object.hasOwn(CHECKS, code) ? CHECKS[code] : undefined
  if (code === 'order' && kind === 'torsion') return { name: 'Working points', unit: 'angle' }
  return words ?? { name: code, unit: null }
}

const TOLERANCES: Readonly<Record<string, { readonly symbol: string, readonly name: string, readonly unit: SheetQuantity }>> = {
  meanDiameterMm: { symbol: 'D', name: 'Mean diameter', unit: 'length' },
  outerDiameterMm: { symbol: 'D_e', name: 'Outside diameter', unit: 'length' },
  innerDiameterMm: { symbol: 'D_i', name: 'Inside diameter', unit: 'length' },
  freeLengthMm: { symbol: 'L_0', name: 'Free length', unit: 'length' },
  insideHooksFreeLengthMm: { symbol: 'L_0', name: 'Free length inside the hooks', unit: 'length' },
  squarenessMm: { symbol: 'e_1', name: 'Squareness of the ground ends', unit: 'length' },
  parallelismMm: { symbol: 'e_2', name: 'Parallelism of the ground ends', unit: 'length' },
}

/** What a tolerance is of: `force2N` is the second load. */
export function toleranceWords(quantity: string): { readonly symbol: string, readonly name: string, readonly unit: SheetQuantity } {
  const load = /^(force|moment)(\d)N(?:mm)?$/.exec(quantity)
  if (load) return load[1] === 'force' ? { symbol: `F_${load[2]}`, name: `Load ${load[2]}`, unit: 'force' } : { symbol: `M_${load[2]}`, name: `Moment ${load[2]}`, unit: 'moment' }
  return (Object.hasOwn(TOLERANCES, quantity) ? TOLERANCES[quantity] : undefined) ?? { symbol: '', name: quantity, unit: 'length' }
}

/** What everybody who holds, fits or tests such a spring must know (common practice, no source). */
export const CAUTIONS: Readonly<Record<SpringKind, readonly string[]>> = {
  compression: [
    'A compressed spring stores energy: hold both ends and protect the eyes when fitting, testing or letting it go.',
    'Where a break could hurt someone, the duty needs the review of a qualified engineer under the rules of the place it is used in.',
  ],
  extension: [
    'An extension spring that breaks flies: give it a stop against over-pulling, and a guard where people are near.',
    'Where a break could hurt someone, the duty needs the review of a qualified engineer under the rules of the place it is used in.',
  ],
  torsion: [
    'A wound spring stores energy and its legs strike: hold both legs and protect the eyes when fitting, testing or letting it go.',
    'Where a break could hurt someone, the duty needs the review of a qualified engineer under the rules of the place it is used in.',
  ],
}
