import { formatLength, formatWireDiameter, formatNumber, THIN_SPACE } from '../../units/format'
import { fromSi, type UnitSystem } from '../../units/convert'
import { compressionShapes } from './compression'
import { axisAcross, dimensionAcross, dimensionUpright, leader } from './dimensions'
import { centreLine, drawnSolidLengthMm, type DrawnSpring } from './drawn-spring'
import type { Placement } from './half-coils'
import { fixedPlate } from './hatch'
import { chartX, chartY, forceAtN, forceTicks, loadChartShapes, type ChartFrame, type LoadCharted, type LoadPoint } from './load-chart'
import { nowShape } from './line-chart'
import { lineH, lineV, symbol, textWidthPx, type Shape } from './shapes'

/** A spring that can be pressed on the page, with what its chart shows. */
export interface PressedSpring {
  readonly spring: DrawnSpring
  readonly rateNPerMm: number
  /** Solid length as calculated, with the wire's tolerance; without it the length at which the drawn coils touch. */
  readonly solidLengthMm?: number | null
  readonly leastWorkingLengthMm?: number | null
  readonly points?: readonly LoadPoint[]
}

export interface PressOptions {
  readonly widthPx: number
  readonly units: UnitSystem
  /** Adds the inside diameter and the wire, where there is room. */
  readonly allDimensions?: boolean
  /** Adds under the chart every length from the fixed plate, shortest nearest. */
  readonly lengthChain?: boolean
  readonly chartHeightPx?: number
}

/** Everything that stands still, and what the moving parts need. */
export interface PressLayout {
  readonly widthPx: number
  readonly heightPx: number
  readonly still: readonly Shape[]
  readonly charted: LoadCharted
  readonly place: Placement
  readonly frame: ChartFrame
  readonly spring: DrawnSpring
  readonly hasAllDimensions: boolean
}

/** From this width on there is room for all dimensions and wider margins. */
const WIDE_PX = 430
const LEAST_WIDTH_PX = 280
const TALLEST_SPRING_PX = 260
const LEAST_CHART_WIDTH_PX = 140

export const diameterSign = '\u2300' + THIN_SPACE

/** Lays out spring and chart on one length axis for the width there is. The spring must be drawable (isDrawable). */
export function layoutPress(pressed: PressedSpring, options: PressOptions): PressLayout {
  const { spring } = pressed
  const { units, lengthChain = false } = options
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const isWide = widthPx > WIDE_PX
  const hasAllDimensions = isWide && options.allDimensions === true
  const charted: LoadCharted = {
    freeLengthMm: spring.freeLengthMm,
    solidLengthMm: Math.min(spring.freeLengthMm, Math.max(pressed.solidLengthMm ?? 0, drawnSolidLengthMm(spring))),
    rateNPerMm: pressed.rateNPerMm,
    leastWorkingLengthMm: pressed.leastWorkingLengthMm ?? null,
    points: pressed.points ?? [],
  }
  const { ticksN, decimals } = forceTicks(charted, units)
  const tickWidthPx = textWidthPx(formatNumber(fromSi(ticksN.at(-1) ?? 0, 'force', units), decimals))
  const leftPx = Math.max(isWide ? 74 : 50, tickWidthPx + 14)
  const rightPx = isWide ? (hasAllDimensions ? 58 : 46) : 20
  const roomPx = widthPx - leftPx - rightPx
  const outerMm = spring.meanDiameterMm + spring.wireDiameterMm
  // A squat spring is held to a height that fits the page, unless its chart would become too narrow to read
  const lengthPx = Math.min(roomPx, Math.max(TALLEST_SPRING_PX / outerMm * spring.freeLengthMm, LEAST_CHART_WIDTH_PX))
  const pxPerMm = lengthPx / spring.freeLengthMm
  const outerPx = outerMm * pxPerMm
  const dimensionYPx = isWide ? 26 : 22
  const place: Placement = { pxPerMm, x0Px: leftPx + (roomPx - lengthPx) / 2, axisYPx: dimensionYPx + 22 + outerPx / 2 }
  const topPx = place.axisYPx - outerPx / 2
  const bottomPx = place.axisYPx + outerPx / 2
  const frame: ChartFrame = {
    x0Px: place.x0Px, titleXPx: place.x0Px - leftPx + 2, pxPerMm, units, forceTicksN: ticksN, forceDecimals: decimals,
    topPx: bottomPx + (hasAllDimensions ? 76 : 62), heightPx: options.chartHeightPx ?? (isWide ? 200 : 170),
  }
  const x0Px = place.x0Px
  const freePx = chartX(place, spring.freeLengthMm)
  const still: Shape[] = [
    ...fixedPlate(x0Px - 1, topPx - 8, bottomPx + 4),
    ...dimensionUpright({ y1Px: topPx, y2Px: bottomPx, xPx: x0Px - (isWide ? 40 : 30), partPx: [x0Px - 10, x0Px - 10], label: diameterSign + formatLength(outerMm, units, { unit: false }) }),
    ...dimensionAcross({ x1Px: x0Px, x2Px: freePx, yPx: dimensionYPx, partPx: [topPx - 6, topPx - 6], label: lengthLabel('0', spring.freeLengthMm, units) }),
    ...loadChartShapes(charted, frame),
  ]
  let heightPx = frame.topPx + frame.heightPx + 50
  if (lengthChain) {
    const chain = lengthChainShapes(charted, frame, heightPx + 6)
    still.push(...chain.shapes)
    heightPx = chain.endPx
  }
  return { widthPx, heightPx, still, charted, place, frame, spring, hasAllDimensions }
}

export const lengthLabel = (index: string, lengthMm: number, units: UnitSystem) =>
  symbol('L', index, `${THIN_SPACE}=${THIN_SPACE}${formatLength(lengthMm, units, { unit: false })}`)

/** Every length from the fixed plate, shortest nearest to the chart (the manner of ISO 2162). */
function lengthChainShapes(charted: LoadCharted, frame: ChartFrame, fromPx: number): { shapes: Shape[], endPx: number } {
  const rows = [
    [charted.solidLengthMm, 'c'] as const,
    ...charted.points.map((point, i) => [point.lengthMm, String(i + 1)] as const).sort((a, b) => a[0] - b[0]),
    [charted.freeLengthMm, '0'] as const,
  ]
  const shapes: Shape[] = []
  let yPx = fromPx + 16
  for (const [lengthMm, index] of rows) {
    shapes.push(...dimensionAcross({ x1Px: frame.x0Px, x2Px: chartX(frame, lengthMm), yPx, partPx: [null, fromPx - 8], label: lengthLabel(index, lengthMm, frame.units) }))
    yPx += 26
  }
  shapes.unshift(lineV('dim-line', frame.x0Px, fromPx - 6, yPx - 21))
  return { shapes, endPx: yPx - 12 }
}

/** A length on the page's slider kept between solid and free. */
export const clampLength = ({ solidLengthMm, freeLengthMm }: Pick<LoadCharted, 'solidLengthMm' | 'freeLengthMm'>, lengthMm: number): number =>
  Math.min(freeLengthMm, Math.max(solidLengthMm, lengthMm))

/** What moves with the plate, at `lengthMm`: spring and plumb lines below the still parts, the point above them. */
export function pressMoving(layout: PressLayout, lengthMm: number): { under: Shape[], over: Shape[] } {
  const { spring, place, frame, charted } = layout
  const { axisYPx, x0Px, pxPerMm } = place
  const outerRadiusPx = (spring.meanDiameterMm + spring.wireDiameterMm) / 2 * pxPerMm
  const topPx = axisYPx - outerRadiusPx
  const bottomPx = axisYPx + outerRadiusPx
  const xPx = chartX(place, lengthMm)
  const yPx = chartY(frame, forceAtN(charted, lengthMm))
  const under: Shape[] = [
    axisAcross(x0Px - 22, Math.min(xPx + 26, layout.widthPx - 2), axisYPx),
    ...compressionShapes(spring, lengthMm, place),
    lineV('plate', xPx + 1, topPx - 10, bottomPx + 10),
  ]
  if (spring.freeLengthMm - lengthMm > spring.freeLengthMm * 1e-3) under.push(lineV('ghost', chartX(place, spring.freeLengthMm), topPx - 6, bottomPx + 6))
  // Plumb lines lie under the chart's lettering
  under.push(lineV('plumb', xPx + 1, bottomPx + 12, yPx), lineH('plumb', x0Px, xPx, yPx))
  if (layout.hasAllDimensions) under.push(...furtherDimensions(layout, lengthMm))
  return { under, over: [nowShape(xPx, yPx)] }
}

function furtherDimensions({ spring, place, frame: { units } }: PressLayout, lengthMm: number): Shape[] {
  const { wireDiameterMm, meanDiameterMm } = spring
  const innerRadiusPx = (meanDiameterMm - wireDiameterMm) / 2 * place.pxPerMm
  const endPx = chartX(place, lengthMm)
  const label = `${diameterSign}${formatWireDiameter(wireDiameterMm, units, { unit: false })} wire`
  const centre = centreLine(spring, lengthMm)
  // The leader leaves a crown at the bottom, as near the middle as its lettering stays left of the moving plate
  let turns = Math.floor(spring.totalCoils / 2) + 0.5
  while (turns > 1.5 && chartX(place, centre(turns)) + 48 + textWidthPx(label) > endPx) turns -= 1
  const crownPx = chartX(place, centre(turns))
  const crownYPx = place.axisYPx + meanDiameterMm / 2 * place.pxPerMm
  const wireRadiusPx = wireDiameterMm / 2 * place.pxPerMm
  return [
    ...dimensionUpright({ y1Px: place.axisYPx - innerRadiusPx, y2Px: place.axisYPx + innerRadiusPx, xPx: endPx + 40, partPx: [endPx, endPx], label: diameterSign + formatLength(meanDiameterMm - wireDiameterMm, units, { unit: false }) }),
    ...leader({ fromPx: [crownPx, crownYPx + wireRadiusPx / 2], elbowPx: [crownPx + 24, crownYPx + wireRadiusPx + 26], label }),
  ]
}

/** Where a slider lies so that its thumb stays under the moving plate. */
export function sliderPlace({ place, charted }: PressLayout, thumbPx: number): { leftPx: number, widthPx: number } {
  return {
    leftPx: chartX(place, charted.solidLengthMm) - thumbPx / 2,
    widthPx: place.pxPerMm * (charted.freeLengthMm - charted.solidLengthMm) + thumbPx,
  }
}
