import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { figureOf } from '#shared/spring/drawing/figure-of'
import { layoutMotion } from '#shared/spring/drawing/motion'
import { PENS, penOf } from '#shared/spring/drawing/pens'
import { svgMarkup } from '#shared/spring/drawing/svg'
import { extensionDesign, flatten, torsionDesign } from './springs'

const css = readFileSync(new URL('../../../app/assets/css/drawing.css', import.meta.url), 'utf8').split('@media')[0] ?? ''
const TOKENS: Readonly<Record<string, string>> = { 'var(--ink)': '#16191F', 'var(--graphite)': '#474E58', 'var(--steel)': '#1D4A76', 'var(--sheet)': '#FDFDFB', 'var(--rule)': '#C9CDC8' }

/** What the style sheet says of a look, later rules over earlier ones. */
function styleOf(look: string): Record<string, string> {
  const wanted = look.split(' ').map(name => `.${name}`).join('')
  const found: Record<string, string> = {}
  for (const [, selectors = '', body = ''] of css.replace(/\/\*[^]*?\*\//g, '').matchAll(/([^{}]+)\{([^}]*)\}/g)) {
    if (!selectors.split(',').some(selector => selector.trim().split(' ').at(-1) === wanted)) continue
    for (const declaration of body.split(';')) {
      const [name, value] = declaration.split(':').map(part => part.trim())
      if (name && value) found[name] = (TOKENS[value] ?? value).toUpperCase()
    }
  }
  return found
}

describe('the pens of drawings', () => {
  it.each(Object.keys(PENS))('draw %s on paper as the style sheet does on a page', (look) => {
    const { fill, stroke, widthPx, dashPx, opacity, fontPx, fontWeight } = penOf(look).pen
    const style = styleOf(look)
    if (stroke !== undefined) expect(style.stroke).toBe(stroke.toUpperCase())
    // Lettering and plates are ink unless the sheet says otherwise
    if (fill !== undefined && fill !== '#16191F') expect(style.fill).toBe(fill.toUpperCase())
    if (widthPx !== undefined) expect(Number(style['stroke-width'])).toBe(widthPx)
    if (dashPx !== undefined) expect(style['stroke-dasharray']).toBe(dashPx.join(' '))
    if (opacity !== undefined) expect(Number(style.opacity)).toBe(opacity)
    if (fontPx !== undefined) expect(style['font-size']).toBe(`${fontPx}PX`)
    if (fontWeight !== undefined) expect(Number(style['font-weight'])).toBe(fontWeight)
  })

  it('know every look that springs which pull and twist are drawn with', () => {
    const designs = [
      extensionDesign(), extensionDesign({ hook: { form: 'crossover-loop' }, bodyCoils: 6.5 }), extensionDesign({ hook: { form: 'half-loop' } }), torsionDesign(),
      torsionDesign({ loadOpens: true, hand: 'left', bodyCoils: 4.6, legs: [{ lengthMm: 12, form: 'tangential' }, { lengthMm: 60, form: 'straight' }] }),
    ]
    for (const design of designs) {
      const motion = layoutMotion(design, { widthPx: 540, units: 'metric' })
      const figure = figureOf(design, { widthPx: 540, units: 'inch' })
      if (!motion || !figure) throw new Error('It must be drawn')
      const { under, over } = motion.moving((motion.low + motion.high) / 2)
      const shapes = flatten([...under, ...motion.still, ...over, ...figure.shapes])
      for (const shape of shapes) expect(() => penOf(shape.look)).not.toThrow()
      expect(svgMarkup({ widthPx: 540, heightPx: 500, shapes, name: 'spring' })).not.toMatch(/NaN|undefined/)
    }
  })
})
