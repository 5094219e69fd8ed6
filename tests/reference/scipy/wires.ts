import { getMaterial, greatestWireDiameterMm, minimumTensileStrengthMpa, modulusMpa, type SizingWire } from '#shared/spring'
import type { ModelWire } from './run'

/** The data of a wire for the Python model; undefined where the material's data do not cover it. */
export function modelWireOf({ id, material, wireDiameterMm: d }: SizingWire): ModelWire | undefined {
  const data = getMaterial(material)
  const strength = minimumTensileStrengthMpa(data, d)
  if (!strength.known) return undefined
  return {
    id, family: data.family, diameter: d, greatestDiameter: greatestWireDiameterMm(d), strength: strength.minimumMpa, shearModulus: modulusMpa(data.shearModulus, d),
    youngsModulus: modulusMpa(data.youngsModulus, d), density: data.densityKgPerM3.value,
  }
}

export type Dice = ReturnType<typeof createDice>

/** Evenly spread numbers from 0 to 1, the same for a seed every time (a linear congruential generator, Numerical Recipes). */
export function createDice(seed: number) {
  let state = seed >>> 0
  const roll = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0
    return state / 2 ** 32
  }
  return {
    between: (low: number, high: number) => low + (high - low) * roll(),
    sometimes: (share: number, value: number) => (roll() < share ? value : undefined),
    pick: <T>(list: readonly [T, ...T[]]): T => list[Math.min(list.length - 1, Math.floor(roll() * list.length))] ?? list[0],
  }
}
