import type { UnitSystem } from '../../units/convert'
import type { ChartRow } from './chart-rows'
import type { MovedSpring } from './moved'
import { layoutPressing } from './pressing'
import { layoutPulling } from './pulling'
import { layoutTurning } from './turning'
import type { Box, Shape } from './shapes'

/** What is read off where the spring is held. */
export interface Reading {
  readonly where: string
  readonly load: string
  /** Of the stress or load allowed; null where that is not known. */
  readonly share: string | null
  readonly tone: 'quiet' | 'caution' | 'stop'
  readonly stateWords: string
}

/** A spring over its chart, laid out for a width: everything that stands still, and what moves with the place where it is held. */
export interface Motion {
  readonly widthPx: number
  readonly heightPx: number
  readonly still: readonly Shape[]
  readonly moving: (at: number) => { readonly under: readonly Shape[], readonly over: readonly Shape[] }
  /** Range of the slider, mm or degrees, and where the spring is free. */
  readonly low: number
  readonly high: number
  readonly free: number
  /** Stops of the slider; with reduced motion there are few. */
  readonly stops: (isCoarse: boolean) => { readonly last: number, readonly at: (index: number) => number, readonly indexOf: (at: number) => number }
  readonly slider: { readonly leftPx: number, readonly widthPx: number }
  /** What can be taken hold of in the drawing, and the place for an x on it; null where only the slider moves it. */
  readonly grip: { readonly boxAt: (at: number) => Box, readonly placeOf: (xPx: number) => number } | null
  readonly reading: (at: number) => Reading
  readonly words: {
    /** 'Press it'. */
    readonly act: string
    /** 'pushes with'. */
    readonly does: string
    /** 'length of the spring'. */
    readonly place: string
    /** 'of the stress allowed'. */
    readonly share: string
  }
  readonly sentence: string
  readonly table: { readonly caption: string, readonly place: string, readonly load: string, readonly rows: readonly ChartRow[] }
}

export interface MotionOptions {
  readonly widthPx: number
  readonly units: UnitSystem
  /** Adds the inside diameter and the wire, where there is room. */
  readonly allDimensions?: boolean | undefined
  /** Adds under the chart every length from the fixed plate. */
  readonly lengthChain?: boolean | undefined
  readonly chartHeightPx?: number | undefined
}

/** Lays out a spring of any kind over its chart; null where its sizes cannot be drawn. */
export function layoutMotion(design: MovedSpring, options: MotionOptions): Motion | null {
  switch (design.kind) {
    case 'compression': return layoutPressing(design, options)
    case 'extension': return layoutPulling(design, options)
    case 'torsion': return layoutTurning(design, options)
  }
}

/** A place kept within the slider's range. */
export const keepWithin = ({ low, high }: Pick<Motion, 'low' | 'high'>, at: number): number => Math.min(high, Math.max(low, at))

/** The reading as one sentence. */
export const motionSentence = ({ words }: Pick<Motion, 'words'>, { where, load, share, stateWords }: Reading): string =>
  `At ${where} it ${words.does} ${load}${share === null ? '' : `, at ${share} ${words.share}`}. ${stateWords}`
