import { penOf, SHEET } from './pens'
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

/** Attributes for a look; an unknown look throws, so that no line is lost in silence. */
function paperInks(look: string): string {
  const { pen, isRound, hasHalo } = penOf(look)
  const written: Record<string, string | number | undefined> = {
    'fill': pen.fill ?? 'none', 'stroke': pen.stroke, 'stroke-width': pen.widthPx, 'stroke-dasharray': pen.dashPx?.join(' '), 'opacity': pen.opacity,
    'font-size': pen.fontPx, 'font-weight': pen.fontWeight, 'stroke-linecap': isRound ? 'round' : undefined,
    ...(hasHalo ? { 'paint-order': 'stroke', 'stroke': SHEET, 'stroke-width': 5, 'stroke-linejoin': 'round' } : {}),
  }
  return Object.entries(written).map(([name, value]) => (value === undefined ? '' : ` ${name}="${value}"`)).join('')
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
