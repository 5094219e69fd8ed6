import { fromSi, toSi, unitSymbol, type UnitSystem } from '../../units/convert'
import { decimalsFor, formatForce, formatLength, formatNumber, THIN_SPACE } from '../../units/format'
import { hatchBox } from './hatch'
import { niceStep, stepDecimals, ticksTo } from './scale'
import { lineH, lineV, path, px, symbol, text, textWidthPx, type Shape } from './shapes'

/** A load that the spring is asked for, at its length; the tolerance is plus or minus. */
export interface LoadPoint {
  readonly lengthMm: number
  readonly forceN: number
  readonly toleranceN?: number | null
}

/** What a chart of load against length shows. */
export interface LoadCharted {
  readonly freeLengthMm: number
  readonly solidLengthMm: number
  readonly rateNPerMm: number
  readonly points: readonly LoadPoint[]
  /** Shortest length that keeps the gap between coils, if known. */
  readonly leastWorkingLengthMm?: number | null
}

/** Where lengths and forces fall on the drawing; the length axis is the spring's own. */
export interface ChartFrame {
  readonly x0Px: number
  readonly pxPerMm: number
  readonly topPx: number
  readonly heightPx: number
  readonly forceTicksN: readonly number[]
  readonly forceDecimals: number
  /** Where the title and the name of the force axis begin. */
  readonly titleXPx: number
  readonly units: UnitSystem
}

/** Force in N at a length: F = R (L0 - L). */
export const forceAtN = ({ rateNPerMm, freeLengthMm }: Pick<LoadCharted, 'rateNPerMm' | 'freeLengthMm'>, lengthMm: number): number => rateNPerMm * (freeLengthMm - lengthMm)

/** Ticks of the force axis in N, at round numbers of the unit shown, past the solid load and every tolerance. */
export function forceTicks(charted: LoadCharted, units: UnitSystem): { ticksN: number[], decimals: number } {
  const greatestN = Math.max(forceAtN(charted, charted.solidLengthMm) * 1.04, ...charted.points.map((p) => p.forceN + (p.toleranceN ?? 0)))
  const greatest = fromSi(greatestN, 'force', units)
  const step = niceStep(greatest / 5)
  const count = Math.max(1, Math.ceil(greatest / step - 1e-9))
  return { ticksN: ticksTo(count * step, step).map((tick) => toSi(tick, 'force', units)), decimals: stepDecimals(step) }
}

export const chartX = (frame: Pick<ChartFrame, 'x0Px' | 'pxPerMm'>, lengthMm: number): number => frame.x0Px + frame.pxPerMm * lengthMm

export function chartY(frame: ChartFrame, forceN: number): number {
  const top = frame.forceTicksN.at(-1) ?? 1
  return frame.topPx + frame.heightPx * (1 - forceN / top)
}

function axes(charted: LoadCharted, frame: ChartFrame): Shape[] {
  const { topPx, heightPx, units, x0Px, pxPerMm } = frame
  const bottomPx = topPx + heightPx
  const endPx = chartX(frame, charted.freeLengthMm)
  const shapes: Shape[] = []
  for (const tickN of frame.forceTicksN) {
    const yPx = chartY(frame, tickN)
    shapes.push(lineH(tickN ? 'gridline' : 'base', x0Px, endPx + 8, yPx))
    shapes.push(text('tick', x0Px - 8, yPx + 4.5, 'end', formatNumber(fromSi(tickN, 'force', units), frame.forceDecimals)))
  }
  const lastLength = fromSi(charted.freeLengthMm, 'length', units)
  const pxPerUnit = pxPerMm * toSi(1, 'length', units)
  const step = niceStep(44 / pxPerUnit)
  const parts = [10, 5, 4, 2].find((n) => step / n * pxPerUnit >= 7 && Math.abs(niceStep(step / n) / (step / n) - 1) < 1e-6) ?? 1
  let small = ''
  for (const tick of ticksTo(lastLength, step / parts)) small += `M${px(x0Px + pxPerUnit * tick)} ${px(bottomPx)}v4`
  shapes.push(path('base', small))
  for (const tick of ticksTo(lastLength, step)) {
    const xPx = x0Px + pxPerUnit * tick
    shapes.push(lineV('base', xPx, bottomPx, bottomPx + 8), text('tick', xPx, bottomPx + 23, 'middle', formatNumber(tick, stepDecimals(step))))
  }
  shapes.push(text('chart-title', frame.titleXPx, topPx - 31, 'start', 'Force at each length'))
  shapes.push(text('tick', frame.titleXPx, topPx - 12, 'start', `force, ${unitSymbol('force', units)}`))
  shapes.push(text('tick', endPx, bottomPx + 43, 'end', `length, ${unitSymbol('length', units)}`))
  return shapes
}

/** The zone that the spring cannot enter: hatched, and named where there is room for words. */
function solidZone(charted: LoadCharted, frame: ChartFrame): Shape[] {
  const { topPx, heightPx, units } = frame
  const endPx = chartX(frame, charted.solidLengthMm)
  const widthPx = endPx - frame.x0Px
  const length = formatLength(charted.solidLengthMm, units)
  const shapes: Shape[] = [
    hatchBox({ xPx: frame.x0Px, yPx: topPx, widthPx, heightPx }),
    lineV('solid-edge', endPx, topPx, topPx + heightPx),
  ]
  const middlePx = frame.x0Px + widthPx / 2
  if (widthPx > textWidthPx(length) + 4) {
    shapes.push(text('tick halo', middlePx, topPx + 20, 'middle', 'solid'), text('tick halo', middlePx, topPx + 38, 'middle', length))
  } else if (widthPx > 20) {
    shapes.push(text('tick halo', middlePx + 4.5, topPx + heightPx / 2, 'middle', `solid ${length}`, true))
  }
  return shapes
}

/** A working point: its tolerance as a bar, its circle, and its name where the load line leaves room: above right, else below left. */
function workingPoints(charted: LoadCharted, frame: ChartFrame): Shape[] {
  const shapes: Shape[] = []
  const rightPx = chartX(frame, charted.freeLengthMm) + 18
  let lastAbove: { xPx: number, yPx: number } | null = null
  const ordered = charted.points.map((point, i) => ({ ...point, index: String(i + 1) })).sort((a, b) => a.lengthMm - b.lengthMm)
  for (const { lengthMm, forceN, toleranceN, index } of ordered) {
    const xPx = chartX(frame, lengthMm)
    const yPx = chartY(frame, forceN)
    if (toleranceN) {
      const upperPx = chartY(frame, forceN + toleranceN)
      const lowerPx = chartY(frame, Math.max(0, forceN - toleranceN))
      shapes.push(path('tolerance', `M${px(xPx)} ${px(upperPx)}V${px(lowerPx)}M${px(xPx - 5)} ${px(lowerPx)}h10M${px(xPx - 5)} ${px(upperPx)}h10`))
    }
    shapes.push({ kind: 'circle', look: 'wanted', xPx, yPx, radiusPx: 5 })
    const shown = fromSi(forceN, 'force', frame.units)
    const label = symbol('F', index, THIN_SPACE + formatForce(forceN, frame.units, { decimals: Math.max(0, decimalsFor(shown) - 1) }))
    const meetsLast = lastAbove !== null && yPx - lastAbove.yPx < 18 && xPx - lastAbove.xPx < textWidthPx(label) + 4
    if (meetsLast || xPx + 12 + textWidthPx(label) > rightPx) {
      shapes.push(text('dim-text halo', xPx - 11, yPx + 19, 'end', label))
    } else {
      shapes.push(text('dim-text halo', xPx + 12, yPx - 9, 'start', label))
      lastAbove = { xPx, yPx }
    }
  }
  return shapes
}

/** The chart but for the point that moves: axes, solid zone, least working length, load line, working points. */
export function loadChartShapes(charted: LoadCharted, frame: ChartFrame): Shape[] {
  const { solidLengthMm, freeLengthMm, leastWorkingLengthMm } = charted
  const bottomPx = frame.topPx + frame.heightPx
  const solidForceN = forceAtN(charted, solidLengthMm)
  const shapes = [...axes(charted, frame), ...solidZone(charted, frame)]
  if (leastWorkingLengthMm && leastWorkingLengthMm < freeLengthMm) shapes.push(lineV('least', chartX(frame, leastWorkingLengthMm), frame.topPx, bottomPx))
  shapes.push(path('load-line', `M${px(chartX(frame, solidLengthMm))} ${px(chartY(frame, solidForceN))}L${px(chartX(frame, freeLengthMm))} ${px(bottomPx)}`))
  shapes.push(...workingPoints(charted, frame))
  return shapes
}
