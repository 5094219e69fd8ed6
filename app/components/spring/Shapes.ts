import { h, type FunctionalComponent, type VNode } from 'vue'
import type { Shape, TextRun } from '#shared/spring/drawing/shapes'

/** How far the index of a symbol stands below the line. */
const INDEX_DROP_PX = 3.5

function spans(runs: readonly TextRun[]): VNode[] | string {
  const only = runs.length === 1 ? runs[0] : undefined
  if (only && !only.style) return only.text
  return runs.map(({ text, style }, i) => {
    const wasIndex = runs[i - 1]?.style === 'index'
    return h('tspan', { class: style, dy: style === 'index' ? INDEX_DROP_PX : wasIndex ? -INDEX_DROP_PX : undefined }, text)
  })
}

function node(shape: Shape): VNode {
  if (shape.kind === 'path') return h('path', { 'class': shape.look, 'd': shape.d, 'stroke-width': shape.strokePx })
  if (shape.kind === 'circle') return h('circle', { class: shape.look, cx: shape.xPx, cy: shape.yPx, r: shape.radiusPx })
  if (shape.kind === 'text') {
    const { xPx, yPx, anchor, look, upright, runs } = shape
    return h('text', { 'x': xPx, 'y': yPx, 'class': look, 'text-anchor': anchor, 'transform': upright ? `rotate(-90 ${xPx} ${yPx})` : undefined }, spans(runs))
  }
  const { xPx, yPx, widthPx, heightPx } = shape.box
  // An inner svg cuts at its own box and needs no id that would have to differ between drawings on one page
  return h('svg', { x: xPx, y: yPx, width: widthPx, height: heightPx, viewBox: `${xPx} ${yPx} ${widthPx} ${heightPx}` }, shape.shapes.map(node))
}

/** Shapes of a drawing as SVG elements; to stand inside an svg. */
const SpringShapes: FunctionalComponent<{ shapes: readonly Shape[] }> = ({ shapes }) => h('g', shapes.map(node))
SpringShapes.props = ['shapes']

export default SpringShapes
