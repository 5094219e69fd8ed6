import { fromSi, type UnitSystem } from '../../units/convert'
import { decimalsFor, formatAngle, formatForce, formatLength, formatNumber, formatShare, formatWireDiameter } from '../../units/format'
import type { CompressionEnds, HookForm } from '../codes'
import { shearStressMpa } from '../mechanics/stress'
import type { ChartRow } from './chart-rows'
import type { DrawnSpring } from './drawn-spring'
import { freeAngleDeg } from './legs'
import type { DrawnExtension, DrawnTorsion } from './moved'
import { forceAtN, type LoadCharted } from './load-chart'

const ENDS_WORDS: Record<CompressionEnds, string> = {
  'closed-ground': 'closed and ground', 'closed': 'closed, not ground', 'open': 'open', 'open-ground': 'open and ground',
}

/** Coil counts are written with no more places than they have. */
const coils = (count: number): string => formatNumber(count, 2).replace(/\.?0+$/, '')

/** One sentence that names the drawing of a spring for those who do not see it. */
export function figureSentence(spring: DrawnSpring, lengthMm: number, units: UnitSystem): string {
  const { wireDiameterMm: d, meanDiameterMm: D } = spring
  return `Compression spring in side view, ${formatLength(lengthMm, units)} long, outside diameter ${formatLength(D + d, units)}, inside diameter ${formatLength(D - d, units)}, wire ${formatWireDiameter(d, units)}, ${coils(spring.activeCoils)} active of ${coils(spring.totalCoils)} coils, ends ${ENDS_WORDS[spring.ends]}, ${spring.hand}-hand.`
}

const HOOK_WORDS: Readonly<Record<HookForm, string>> = {
  'full-loop': 'full loops', 'half-loop': 'half loops', 'crossover-loop': 'crossed loops', 'extended-hook': 'extended hooks',
}

/** One sentence that names the drawing of an extension spring for those who do not see it. */
export function extensionSentence(spring: DrawnExtension, lengthMm: number, units: UnitSystem): string {
  const { wireDiameterMm: d, meanDiameterMm: D } = spring
  return `Extension spring in side view, ${formatLength(lengthMm, units)} long inside its ${HOOK_WORDS[spring.hookForm]}, outside diameter ${formatLength(D + d, units)}, wire ${formatWireDiameter(d, units)}, ${coils(spring.bodyCoils)} coils in the body, ${spring.hand}-hand.`
}

/** One sentence that names the drawing of a torsion spring for those who do not see it. */
export function torsionSentence(spring: DrawnTorsion, units: UnitSystem, view: string): string {
  const { wireDiameterMm: d, meanDiameterMm: D, legs: [first, second] } = spring
  const form = first?.form === 'straight' ? 'along the axis' : `off the coil, ${formatAngle(freeAngleDeg(spring))} apart`
  const legWords = first && second ? `legs ${formatLength(first.lengthMm, units)} and ${formatLength(second.lengthMm, units)} ${form}` : 'no legs'
  return `Torsion spring ${view}, outside diameter ${formatLength(D + d, units)}, inside diameter ${formatLength(D - d, units)}, wire ${formatWireDiameter(d, units)}, ${coils(spring.bodyCoils)} coils in the body, ${legWords}, ${spring.hand}-hand.`
}

/** What the pressed length means: solid, too close, over the stress allowed, free, or within the working range. */
export type PressState = 'solid' | 'too-close' | 'over-stress' | 'free' | 'working' | 'between'

const STATE_WORDS: Record<PressState, string> = {
  'solid': 'Pressed solid: coils touch.',
  'too-close': 'Closer than the gap the standard keeps between coils.',
  'over-stress': 'More stress than the wire is allowed.',
  'free': 'Free: no load.',
  'working': 'Within its working range.',
  'between': 'Between free and solid.',
}

export interface PressReading {
  readonly length: string
  readonly force: string
  /** Uncorrected stress as a share of what is allowed; null if that is not known. */
  readonly share: string | null
  readonly state: PressState
  readonly stateWords: string
}

/** What is read off at a length; the places do not change while the spring is pressed, so that the line stands still. */
export function readPress(spring: DrawnSpring, charted: LoadCharted, lengthMm: number, units: UnitSystem, allowableStressMpa?: number | null): PressReading {
  const { solidLengthMm, freeLengthMm, leastWorkingLengthMm } = charted
  const forceN = forceAtN(charted, lengthMm)
  const share = allowableStressMpa ? shearStressMpa(forceN, spring.meanDiameterMm, spring.wireDiameterMm) / allowableStressMpa : null
  const near = freeLengthMm * 1e-3
  const state: PressState = lengthMm <= solidLengthMm + near / 2
    ? 'solid'
    : lengthMm >= freeLengthMm - near / 2
      ? 'free'
      : share !== null && share > 1
        ? 'over-stress'
        : !leastWorkingLengthMm ? 'between' : lengthMm < leastWorkingLengthMm ? 'too-close' : 'working'
  const greatest = fromSi(forceAtN(charted, solidLengthMm), 'force', units)
  return {
    length: formatLength(lengthMm, units),
    force: formatForce(forceN, units, { decimals: Math.max(greatest >= 100 && greatest < 1000 ? 1 : 0, decimalsFor(greatest)) }),
    share: share === null ? null : formatShare(share),
    state,
    stateWords: STATE_WORDS[state],
  }
}

/** The reading as one sentence: 'At 42.0 mm it pushes with 108.5 N, at 33 % of the stress allowed. Within its working range.' */
export function readingSentence({ length, force, share, stateWords }: PressReading): string {
  return `At ${length} it pushes with ${force}${share === null ? '' : `, at ${share} of the stress allowed`}. ${stateWords}`
}

/** The chart's data as rows of a table, longest first. */
export function chartRows(charted: LoadCharted, units: UnitSystem): ChartRow[] {
  const at = (name: string, lengthMm: number, forceN = forceAtN(charted, lengthMm), toleranceN?: number | null) =>
    ({ lengthMm, name, place: formatLength(lengthMm, units), load: formatForce(forceN, units), tolerance: toleranceN ? `±${formatForce(toleranceN, units)}` : '' })
  const rows = [
    at('Free', charted.freeLengthMm, 0),
    ...charted.points.map((point, i) => at(`Load F${i + 1}`, point.lengthMm, point.forceN, point.toleranceN)),
    ...(charted.leastWorkingLengthMm ? [at('Least working length', charted.leastWorkingLengthMm)] : []),
    at('Solid, not for use', charted.solidLengthMm),
  ]
  return rows.sort((a, b) => b.lengthMm - a.lengthMm).map(({ name, place, load, tolerance }) => ({ name, place, load, tolerance }))
}
