import { px, type Shape, type TextShape } from './shapes'

const escapeText = (value: string): string => value.replace(/[&<>"]/g, (mark) => `&#${mark.charCodeAt(0)};`)

/** How far the index of a symbol stands below the line. */
const INDEX_DROP_PX = 3.5

function textMarkup({ look, xPx, yPx, anchor, upright, runs }: TextShape, inks: Inks): string {
  let dropped = false
  const spans = runs.map(({ text, style }) => {
    const dy = style === 'index' ? INDEX_DROP_PX : dropped ? -INDEX_DROP_PX : 0
    dropped = style === 'index'
    return `<tspan${dy ? ` dy="${dy}"` : ''}${style === 'symbol' ? ' font-style="italic"' : style === 'index' ? ' font-size="10.4"' : ''}>${escapeText(text)}</tspan>`
  })
  return `<text x="${px(xPx)}" y="${px(yPx)}" text-anchor="${anchor}"${upright ? ` transform="rotate(-90 ${px(xPx)} ${px(yPx)})"` : ''}${inks(look)}>${spans.join('')}</text>`
}

type Inks = (look: string) => string

function shapeMarkup(shape: Shape, inks: Inks): string {
  if (shape.kind === 'path') return `<path d="${shape.d}"${inks(shape.look)}${shape.strokePx === undefined ? '' : ` stroke-width="${shape.strokePx}"`}/>`
  if (shape.kind === 'circle') return `<circle cx="${px(shape.xPx)}" cy="${px(shape.yPx)}" r="${px(shape.radiusPx)}"${inks(shape.look)}/>`
  if (shape.kind === 'text') return textMarkup(shape, inks)
  // An inner svg cuts at its own box and needs no id, so that drawings can stand beside each other in one document
  const box = [shape.box.xPx, shape.box.yPx, shape.box.widthPx, shape.box.heightPx].map(px)
  return `<svg x="${box[0]}" y="${box[1]}" width="${box[2]}" height="${box[3]}" viewBox="${box.join(' ')}">${shape.shapes.map((inner) => shapeMarkup(inner, inks)).join('')}</svg>`
}

// The drawing on paper, where no style sheet is at hand: the tokens' values of design.md
const INK = '#16191F'
const GRAPHITE = '#474E58'
const STEEL = '#1D4A76'
const PAPER_INKS: Record<string, string> = {
  'w-edge near': `fill="none" stroke="${INK}"`,
  'w-edge far': 'fill="none" stroke="#7C848B"',
  'w-body near': 'fill="none" stroke="#F8F9F9"',
  'w-body far': 'fill="none" stroke="#E3E7E8"',
  'w-cut': `fill="none" stroke="${INK}" stroke-width="1.4"`,
  'w-face': `fill="none" stroke="${INK}" stroke-width="1.6"`,
  'dim-line': `fill="none" stroke="${GRAPHITE}" stroke-width="0.9"`,
  'dim-arrow': `fill="${GRAPHITE}"`,
  'dim-text': `fill="${INK}" font-size="14" font-weight="500"`,
  'tick': `fill="${GRAPHITE}" font-size="13"`,
  'chart-title': `fill="${INK}" font-size="14" font-weight="600"`,
  'axis': `fill="none" stroke="${STEEL}" stroke-width="0.9" stroke-dasharray="16 3.5 2.5 3.5"`,
  'hatch': `fill="none" stroke="${GRAPHITE}" stroke-width="0.9" opacity="0.55"`,
  'plate': `fill="none" stroke="${INK}" stroke-width="2.4"`,
  'ghost': `fill="none" stroke="${GRAPHITE}" stroke-width="0.9" stroke-dasharray="5 4"`,
  'plumb': `fill="none" stroke="${STEEL}" stroke-width="1" stroke-dasharray="2 3"`,
  'gridline': 'fill="none" stroke="#C9CDC8" stroke-width="0.8"',
  'base': `fill="none" stroke="${INK}" stroke-width="1.1"`,
  'break': `fill="none" stroke="${GRAPHITE}" stroke-width="0.9"`,
  'solid-edge': `fill="none" stroke="${INK}" stroke-width="1.4"`,
  'least': `fill="none" stroke="${GRAPHITE}" stroke-width="1" stroke-dasharray="6 3"`,
  'load-line': `fill="none" stroke="${INK}" stroke-width="1.8"`,
  'tolerance': `fill="none" stroke="${INK}" stroke-width="1.4"`,
  'wanted': `fill="#FDFDFB" stroke="${INK}" stroke-width="1.8"`,
  'now': `fill="${STEEL}"`,
  'force': `fill="none" stroke="${STEEL}" stroke-width="2.2"`,
  'force-arrow': `fill="${STEEL}"`,
}

/** Attributes for a look without a style sheet; an unknown look throws, so that no line is lost in silence. */
function paperInks(look: string): string {
  const isRound = look.endsWith(' round')
  const isHalo = look.endsWith(' halo')
  const ink = PAPER_INKS[look.replace(/ (round|halo)$/, '')]
  if (ink === undefined) throw new Error(`No ink is known for the look '${look}'`)
  return ` ${ink}${isRound ? ' stroke-linecap="round"' : ''}${isHalo ? ' paint-order="stroke" stroke="#FDFDFB" stroke-width="5" stroke-linejoin="round"' : ''}`
}

interface Sheet {
  readonly widthPx: number
  readonly heightPx: number
  readonly shapes: readonly Shape[]
  /** A sentence that says what is drawn. */
  readonly name: string
}

/** The drawing as one self-contained SVG text with its inks written in: for a file, an e-mail or a paper. */
export function svgMarkup({ widthPx, heightPx, shapes, name }: Sheet): string {
  const body = shapes.map((shape) => shapeMarkup(shape, paperInks)).join('')
  const size = `width="${px(widthPx)}" height="${px(heightPx)}" viewBox="0 0 ${px(widthPx)} ${px(heightPx)}"`
  return `<svg xmlns="http://www.w3.org/2000/svg" ${size} role="img" aria-label="${escapeText(name)}" font-family="Work Sans, Arial, sans-serif">${body}</svg>`
}
