import { isDrawable } from './drawn-spring'
import { extensionFigure } from './extension-figure'
import { figureShapes, type Figure, type FigureOptions } from './figure'
import { drawnCompression, drawnExtension, drawnTorsion, isDrawableExtension, isDrawableTorsion, type MovedSpring } from './moved'
import { hasSideView, torsionFigure } from './torsion-figure'
import { extensionSentence, figureSentence, torsionSentence } from './words'

/** A still figure with its dimensions, and the sentence that names it. */
export type NamedFigure = Pick<Figure, 'widthPx' | 'heightPx' | 'shapes' | 'pxPerMm'> & { readonly sentence: string }

/** A spring of any kind, unloaded or at the length shown, true to scale with its dimensions, at the width there is; null where it cannot be drawn. */
export function figureOf(design: MovedSpring, options: FigureOptions): NamedFigure | null {
  switch (design.kind) {
    case 'compression': {
      const drawn = drawnCompression(design.spring)
      return isDrawable(drawn) ? { ...figureShapes(drawn, options), sentence: figureSentence(drawn, options.shownLengthMm ?? drawn.freeLengthMm, options.units) } : null
    }
    case 'extension': {
      const drawn = drawnExtension(design)
      return isDrawableExtension(drawn) ? { ...extensionFigure(drawn, options), sentence: extensionSentence(drawn, Math.max(drawn.freeLengthMm, options.shownLengthMm ?? 0), options.units) } : null
    }
    case 'torsion': {
      const drawn = drawnTorsion(design)
      return isDrawableTorsion(drawn) ? { ...torsionFigure(drawn, options), sentence: torsionSentence(drawn, options.units, hasSideView(options) ? 'in side view and seen from its end' : 'seen from its end') } : null
    }
  }
}
