/**
 * A drawing as plain data: what to draw, in px, with class names for the look. A page renders it with Vue, a paper with
 * any other pen; nothing here knows a document.
 */
export type Shape = PathShape | CircleShape | TextShape | ClipShape

export interface PathShape {
  readonly kind: 'path'
  readonly look: string
  /** SVG path data: M, L, H, V, C, Z with absolute coordinates, 'l' for short strokes and a zero-length 'h0' for a dot. */
  readonly d: string
  /** Only where the width is a size of the part, such as the wire; else the look gives it. */
  readonly strokePx?: number
}

export interface CircleShape {
  readonly kind: 'circle'
  readonly look: string
  readonly xPx: number
  readonly yPx: number
  readonly radiusPx: number
}

/** A piece of lettering; a symbol is italic, its index stands below the line. */
export interface TextRun {
  readonly text: string
  readonly style?: 'symbol' | 'index'
}

export interface TextShape {
  readonly kind: 'text'
  readonly look: string
  readonly xPx: number
  readonly yPx: number
  readonly anchor: 'start' | 'middle' | 'end'
  /** Lettering of upright dimensions is read from the right. */
  readonly upright?: boolean
  readonly runs: readonly TextRun[]
}

/** Shapes cut off outside an upright rectangle. */
export interface ClipShape {
  readonly kind: 'clip'
  readonly box: Box
  readonly shapes: readonly Shape[]
}

export interface Box {
  readonly xPx: number
  readonly yPx: number
  readonly widthPx: number
  readonly heightPx: number
}

/** Coordinates are written to a hundredth of a pixel. */
export const px = (value: number): string => String(Math.round(value * 100) / 100)

export const path = (look: string, d: string, strokePx?: number): PathShape =>
  strokePx === undefined ? { kind: 'path', look, d } : { kind: 'path', look, d, strokePx: Math.round(strokePx * 100) / 100 }

export const lineH = (look: string, x1Px: number, x2Px: number, yPx: number): PathShape => path(look, `M${px(x1Px)} ${px(yPx)}H${px(x2Px)}`)

export const lineV = (look: string, xPx: number, y1Px: number, y2Px: number): PathShape => path(look, `M${px(xPx)} ${px(y1Px)}V${px(y2Px)}`)

type Lettering = string | readonly TextRun[]

const asRuns = (lettering: Lettering): readonly TextRun[] => (typeof lettering === 'string' ? [{ text: lettering }] : lettering)

export function text(look: string, xPx: number, yPx: number, anchor: TextShape['anchor'], lettering: Lettering, upright = false): TextShape {
  const shape = { kind: 'text', look, xPx: Math.round(xPx * 100) / 100, yPx: Math.round(yPx * 100) / 100, anchor, runs: asRuns(lettering) } as const
  return upright ? { ...shape, upright } : shape
}

/** A symbol with its index and what follows: symbol('L', '0', ' = 60.0'). */
export function symbol(letter: string, index: string, rest = ''): TextRun[] {
  const runs: TextRun[] = [{ text: letter, style: 'symbol' }]
  if (index) runs.push({ text: index, style: 'index' })
  if (rest) runs.push({ text: rest })
  return runs
}

/** Width that lettering of 14 px takes, roughly: 7.9 px a letter, thin spaces and indices less. Measured on Work Sans 500. */
export function textWidthPx(lettering: Lettering): number {
  let width = 0
  for (const { text: letters, style } of asRuns(lettering)) {
    for (const letter of letters) width += letter === '\u202f' ? 3 : '.,\' '.includes(letter) ? 4 : style === 'index' ? 6 : 8.2
  }
  return width
}
