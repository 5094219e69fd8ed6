import fc from 'fast-check'
import { evaluateExtension, evaluateTorsion, type ExtensionInput, type TorsionInput } from '#shared/spring'
import { HOOK_FORMS, LEG_FORMS } from '#shared/spring/codes'
import type { DrawnSpring } from '#shared/spring/drawing/drawn-spring'
import type { MovedExtension, MovedTorsion } from '#shared/spring/drawing/moved'
import { textWidthPx, type Shape } from '#shared/spring/drawing/shapes'

/** The demonstration spring: d 2.5, D 20, n 8.25, L0 60, closed and ground. */
export const demoSpring: DrawnSpring = {
  wireDiameterMm: 2.5, meanDiameterMm: 20, activeCoils: 8.25, totalCoils: 10.25, freeLengthMm: 60, ends: 'closed-ground', hand: 'right',
}

const extraCoils = { 'closed-ground': 2, 'closed': 2, 'open': 0, 'open-ground': 1 } as const

/** Springs over the whole range that can be ordered: d 0.07 to 16 mm, index 4 to 20, 2 to 60 coils, gaps up to 8 d. */
export const anySpring: fc.Arbitrary<DrawnSpring> = fc.record({
  wireDiameterMm: fc.double({ min: 0.07, max: 16, noNaN: true }),
  index: fc.double({ min: 4, max: 20, noNaN: true }),
  activeCoils: fc.integer({ min: 8, max: 240 }).map((quarters) => quarters / 4),
  gapShare: fc.double({ min: 0.05, max: 8, noNaN: true }),
  ends: fc.constantFrom('closed-ground', 'closed', 'open', 'open-ground'),
  hand: fc.constantFrom('right', 'left'),
}).map(({ wireDiameterMm, index, activeCoils, gapShare, ends, hand }) => {
  const totalCoils = activeCoils + extraCoils[ends]
  const solid = (totalCoils + (ends.endsWith('ground') ? 0 : 1)) * wireDiameterMm
  return { wireDiameterMm, meanDiameterMm: wireDiameterMm * index, activeCoils, totalCoils, freeLengthMm: solid + gapShare * wireDiameterMm * activeCoils, ends, hand }
})

/** All shapes, those inside clips too. */
export function flatten(shapes: readonly Shape[]): Exclude<Shape, { kind: 'clip' }>[] {
  return shapes.flatMap((shape) => (shape.kind === 'clip' ? flatten(shape.shapes) : [shape]))
}

/** End points of every curve and line of a path of absolute commands; relative short strokes and dots add none. */
export function pathPoints(d: string): { x: number, y: number }[] {
  const points: { x: number, y: number }[] = []
  let x = 0
  let y = 0
  for (const [, command = '', rest = ''] of d.matchAll(/([MLHVCAZlhv])([^MLHVCAZlhv]*)/g)) {
    const numbers = rest.trim().split(/[ ,]+/).filter(Boolean).map(Number)
    if (command === 'H') x = numbers[0] ?? Number.NaN
    else if (command === 'V') y = numbers[0] ?? Number.NaN
    else if ('MLCA'.includes(command)) [x = Number.NaN, y = Number.NaN] = numbers.slice(-2)
    else continue
    points.push({ x, y })
  }
  return points
}

export const extensionDesign = (overrides: Partial<ExtensionInput> = {}): MovedExtension => {
  const spring: ExtensionInput = {
    kind: 'extension', material: 'EN10270-1-SH', wireDiameterMm: 1.6, meanDiameterMm: 12, bodyCoils: 20, initialTensionN: 12, hook: { form: 'full-loop' }, points: [{ lengthMm: 60 }, { lengthMm: 80 }], ...overrides,
  }
  return { kind: 'extension', spring, evaluation: evaluateExtension(spring) }
}

export const torsionDesign = (overrides: Partial<TorsionInput> = {}): MovedTorsion => {
  const spring: TorsionInput = {
    kind: 'torsion', material: 'EN10270-1-SH', wireDiameterMm: 2, meanDiameterMm: 16, bodyCoils: 5.25, legs: [{ lengthMm: 30, form: 'tangential' }, { lengthMm: 30, form: 'tangential' }],
    points: [{ angleDeg: 30 }, { angleDeg: 90 }], ...overrides,
  }
  return { kind: 'torsion', spring, evaluation: evaluateTorsion(spring) }
}

const size = (min: number, max: number) => fc.double({ min, max, noNaN: true })

/** Extension and torsion springs far beyond what is sensible: wire 0.05 to 12 mm, index 1.2 to 25, up to 60 coils, any hook, leg and hand. */
export const anyPulledOrTurned: fc.Arbitrary<readonly [MovedExtension, MovedTorsion]> = fc.record({
  d: size(0.05, 12), w: size(1.2, 25), n: size(0.2, 60), at: size(1, 300), form: fc.constantFrom(...HOOK_FORMS), leg: size(0.1, 200), secondLeg: size(0.1, 200),
  firstForm: fc.constantFrom(...LEG_FORMS), secondForm: fc.constantFrom(...LEG_FORMS), loadOpens: fc.boolean(), hand: fc.constantFrom('left', 'right'),
}).map(({ d, w, n, at, form, leg, secondLeg, firstForm, secondForm, loadOpens, hand }) => {
  const shape = { wireDiameterMm: d, meanDiameterMm: d * w, bodyCoils: n, hand }
  return [
    extensionDesign({ ...shape, hook: { form }, points: [{ lengthMm: at }] }),
    torsionDesign({ ...shape, legs: [{ lengthMm: leg, form: firstForm }, { lengthMm: secondLeg, form: secondForm }], loadOpens, points: [{ angleDeg: at }] }),
  ] as const
})

/** Boxes that lettering takes, with the words: measured as the layout measures them. */
export function textBoxes(shapes: readonly Shape[]): { words: string, left: number, right: number, top: number, bottom: number }[] {
  return flatten(shapes).flatMap((shape) => {
    if (shape.kind !== 'text') return []
    const width = textWidthPx(shape.runs)
    const before = shape.anchor === 'start' ? 0 : shape.anchor === 'end' ? width : width / 2
    const words = shape.runs.map(run => run.text).join('')
    const { xPx: x, yPx: y } = shape
    return [shape.upright
      ? { words, left: x - 10, right: x + 3, top: y + before - width, bottom: y + before }
      : { words, left: x - before, right: x - before + width, top: y - 10, bottom: y + 3 }]
  })
}

/** Pairs of words that lie on each other. */
export function wordsThatMeet(shapes: readonly Shape[]): string[] {
  const boxes = textBoxes(shapes)
  return boxes.flatMap((a, i) => boxes.slice(i + 1).filter(b => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom).map(b => `${a.words} on ${b.words}`))
}

/** What lies off a drawing: ends of lines, and lettering, by more than a pixel. */
export function partsOutside({ widthPx, heightPx }: { readonly widthPx: number, readonly heightPx: number }, shapes: readonly Shape[]): string[] {
  const isOff = (left: number, right: number, top: number, bottom: number) => !(left >= -1 && right <= widthPx + 1 && top >= -1 && bottom <= heightPx + 1)
  return [
    ...textBoxes(shapes).filter(({ left, right, top, bottom }) => isOff(left, right, top, bottom)).map(({ words, left, right, top, bottom }) => `'${words}' ${[left, right, top, bottom].map(Math.round).join(' ')}`),
    ...flatten(shapes.filter(shape => shape.kind !== 'clip')).flatMap(shape => (shape.kind === 'path' ? pathPoints(shape.d).filter(({ x, y }) => isOff(x, x, y, y)).map(({ x, y }) => `${shape.look} ${Math.round(x)} ${Math.round(y)}`) : [])),
  ]
}

/** Every number of the places of shapes. */
export const placesOf = (shapes: readonly Shape[]): number[] => flatten(shapes).flatMap(shape => (shape.kind === 'path'
  ? [...shape.d.matchAll(/-?\d+(?:\.\d+)?|NaN|Infinity/g)].map(match => Number(match[0]))
  : shape.kind === 'circle' ? [shape.xPx, shape.yPx, shape.radiusPx] : [shape.xPx, shape.yPx]))
