import type { SpringEvaluation, SpringInput } from '#shared/spring'
import { figureOf, type NamedFigure } from '#shared/spring/drawing/figure-of'
import { layoutMotion } from '#shared/spring/drawing/motion'
import type { MovedSpring } from '#shared/spring/drawing/moved'
import { penOf } from '#shared/spring/drawing/pens'
import type { Shape, TextShape } from '#shared/spring/drawing/shapes'
import type { UnitSystem } from '#shared/units/convert'
import { INKS, MM, settable, type Pdf } from './paper'

/** Points to one unit of the drawings: their lettering of 14 becomes 9 points. */
export const PT_PER_PX = 0.65

// ISO 5455, and the same series on to the smallest springs and the largest
const SCALES = [100, 50, 20, 10, 5, 2, 1, 1 / 2, 1 / 5, 1 / 10, 1 / 20, 1 / 50, 1 / 100, 1 / 200, 1 / 500, 1 / 1000] as const
const scaleWords = (scale: number): string => (scale >= 1 ? `${scale}:1` : `1:${Math.round(1 / scale)}`)
const pxPerMmAt = (scale: number): number => (scale * MM) / PT_PER_PX

/** A spring with its evaluation, as the drawings take it. */
export function movedOf(spring: SpringInput, evaluation: SpringEvaluation): MovedSpring | null {
  if (spring.kind === 'compression' && evaluation.kind === 'compression') return { kind: 'compression', spring, evaluation }
  if (spring.kind === 'extension' && evaluation.kind === 'extension') return { kind: 'extension', spring, evaluation }
  if (spring.kind === 'torsion' && evaluation.kind === 'torsion') return { kind: 'torsion', spring, evaluation }
  return null
}

/** What the height of a figure is measured by: the outside of the coil, or of the turning legs, read off a drawing that only its height holds down. */
function tallestMm(design: MovedSpring, { widthPx, units }: { widthPx: number, units: UnitSystem }): number {
  if (design.kind === 'compression') return design.spring.meanDiameterMm + design.spring.wireDiameterMm
  const low = figureOf(design, { widthPx, units, tallestPx: 1 })
  return low ? 1 / low.pxPerMm : 0
}

/** The spring with its dimensions at the largest scale of the standard that fits; null where it cannot be drawn. */
export function figureToScale(design: MovedSpring, { widthPx, tallestPx, units }: { widthPx: number, tallestPx: number, units: UnitSystem }): { figure: NamedFigure, scale: string } | null {
  const free = figureOf(design, { widthPx, units, tallestPx })
  if (!free) return null
  const scale = SCALES.find(one => pxPerMmAt(one) <= free.pxPerMm)
  const tallest = scale === undefined ? 0 : pxPerMmAt(scale) * tallestMm(design, { widthPx, units })
  const figure = tallest > 0 ? figureOf(design, { widthPx, units, tallestPx: tallest }) : null
  // A long thin spring is drawn broken, at a scale of its own
  if (!figure || scale === undefined || Math.abs(figure.pxPerMm / pxPerMmAt(scale) - 1) > 1e-6) return { figure: free, scale: 'not to scale' }
  return { figure, scale: scaleWords(scale) }
}

export interface Chart {
  readonly widthPx: number
  readonly heightPx: number
  readonly shapes: readonly Shape[]
  readonly sentence: string
}

/** The spring at rest over its chart of load or moment; null where it cannot be drawn. */
export function chartOf(design: MovedSpring, { widthPx, units }: { widthPx: number, units: UnitSystem }): Chart | null {
  const motion = layoutMotion(design, { widthPx, units })
  if (!motion) return null
  const { under, over } = motion.moving(motion.free)
  return { widthPx: motion.widthPx, heightPx: motion.heightPx, shapes: [...under, ...motion.still, ...over], sentence: motion.sentence }
}

function drawText(pdf: Pdf, { look, xPx, yPx, anchor, upright, runs }: TextShape): void {
  const { pen, hasHalo } = penOf(look)
  const sizePx = pen.fontPx ?? 14
  const font = (pen.fontWeight ?? 400) >= 600 ? 'bold' : 'regular'
  const pieces = runs.map(({ text, style }) => {
    const size = style === 'index' ? sizePx * 0.74 : sizePx
    const letters = settable(text)
    const chosen = /[\u0370-\u03FF]/.test(letters) ? 'greek' : font
    return { letters, size, font: chosen, isOblique: style === 'symbol', drop: style === 'index' ? 3.5 : 0, width: pdf.font(chosen).fontSize(size).widthOfString(letters) }
  })
  const width = pieces.reduce((sum, piece) => sum + piece.width, 0)
  pdf.save().translate(xPx, yPx)
  if (upright) pdf.rotate(-90)
  let at = anchor === 'middle' ? -width / 2 : anchor === 'end' ? -width : 0
  if (hasHalo) pdf.rect(at - 2, -sizePx * 0.8, width + 4, sizePx * 1.05).fillColor('#FFFFFF').fill()
  pdf.fillColor(pen.fill ?? INKS.ink)
  for (const piece of pieces) {
    pdf.font(piece.font).fontSize(piece.size).text(piece.letters, at, piece.drop, { lineBreak: false, baseline: 'alphabetic', oblique: piece.isOblique })
    at += piece.width
  }
  pdf.restore()
}

/** Draws shapes with the pens of paper; the place and the scale are the caller's. */
export function drawShapes(pdf: Pdf, shapes: readonly Shape[]): void {
  for (const shape of shapes) {
    if (shape.kind === 'text') drawText(pdf, shape)
    else if (shape.kind === 'clip') {
      const { xPx, yPx, widthPx, heightPx } = shape.box
      pdf.save().rect(xPx, yPx, widthPx, heightPx).clip()
      drawShapes(pdf, shape.shapes)
      pdf.restore()
    }
    else {
      const { pen, isRound } = penOf(shape.look)
      pdf.save()
      if (shape.kind === 'circle') pdf.circle(shape.xPx, shape.yPx, shape.radiusPx)
      else pdf.path(shape.d)
      pdf.lineWidth((shape.kind === 'path' ? shape.strokePx : undefined) ?? pen.widthPx ?? 1).lineCap(isRound ? 'round' : 'butt').lineJoin('round').opacity(pen.opacity ?? 1)
      // A chain of more than one dash, which the library's own call does not take
      if (pen.dashPx) pdf.addContent(`[${pen.dashPx.join(' ')}] 0 d`)
      if (pen.fill && pen.stroke) pdf.fillAndStroke(pen.fill, pen.stroke)
      else if (pen.fill) pdf.fillColor(pen.fill).fill()
      else pdf.strokeColor(pen.stroke ?? INKS.ink).stroke()
      pdf.restore()
    }
  }
}
