/** How a look is drawn where no style sheet is at hand: in a file, an e-mail, on paper. */
export interface Pen {
  readonly fill?: string
  readonly stroke?: string
  /** Absent where the shape itself carries the width, such as the wire's. */
  readonly widthPx?: number
  readonly dashPx?: readonly number[]
  readonly opacity?: number
  readonly fontPx?: number
  readonly fontWeight?: 500 | 600
}

// The tokens' values of design.md
export const INK = '#16191F'
export const GRAPHITE = '#474E58'
export const STEEL = '#1D4A76'
export const SHEET = '#FDFDFB'

/** Pens by look, the one table for files and paper; the style sheet says the same for pages. */
export const PENS: Readonly<Record<string, Pen>> = {
  'w-edge near': { stroke: INK },
  'w-edge far': { stroke: '#7C848B' },
  'w-body near': { stroke: '#F8F9F9' },
  'w-body far': { stroke: '#E3E7E8' },
  'w-cut': { stroke: INK, widthPx: 1.4 },
  'w-face': { stroke: INK, widthPx: 1.6 },
  'dim-line': { stroke: GRAPHITE, widthPx: 0.9 },
  'dim-arrow': { fill: GRAPHITE },
  'dim-text': { fill: INK, fontPx: 14, fontWeight: 500 },
  'tick': { fill: GRAPHITE, fontPx: 13 },
  'chart-title': { fill: INK, fontPx: 14, fontWeight: 600 },
  'axis': { stroke: STEEL, widthPx: 0.9, dashPx: [16, 3.5, 2.5, 3.5] },
  'hatch': { stroke: GRAPHITE, widthPx: 0.9, opacity: 0.55 },
  'plate': { stroke: INK, widthPx: 2.4 },
  'pin': { fill: INK },
  'ghost': { stroke: GRAPHITE, widthPx: 0.9, dashPx: [5, 4] },
  'plumb': { stroke: STEEL, widthPx: 1, dashPx: [2, 3] },
  'gridline': { stroke: '#C9CDC8', widthPx: 0.8 },
  'base': { stroke: INK, widthPx: 1.1 },
  'break': { stroke: GRAPHITE, widthPx: 0.9 },
  'solid-edge': { stroke: INK, widthPx: 1.4 },
  'least': { stroke: GRAPHITE, widthPx: 1, dashPx: [6, 3] },
  'load-line': { stroke: INK, widthPx: 1.8 },
  'tolerance': { stroke: INK, widthPx: 1.4 },
  'wanted': { fill: SHEET, stroke: INK, widthPx: 1.8 },
  'now': { fill: STEEL },
  'force': { stroke: STEEL, widthPx: 2.2 },
  'force-arrow': { fill: STEEL },
}

/** The pen of a look and what is added to it: round ends, a halo under lettering. An unknown look throws, so that no line is lost in silence. */
export function penOf(look: string): { readonly pen: Pen, readonly isRound: boolean, readonly hasHalo: boolean } {
  const name = look.replace(/ (round|halo)$/, '')
  const pen = Object.hasOwn(PENS, name) ? PENS[name] : undefined
  if (pen === undefined) throw new Error(`No pen is known for the look '${look}'`)
  return { pen, isRound: look.endsWith(' round'), hasHalo: look.endsWith(' halo') }
}
