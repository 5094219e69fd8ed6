import type { MaterialCode } from '../codes'

/** Where a value comes from: a published text, memory of a source, or computed here. */
export type Origin = 'published' | 'from memory' | 'computed'

/** A number with the place it was taken from. */
export interface SourcedValue {
  readonly value: number
  readonly origin: Origin
  readonly source: string
}

/** A modulus that falls in steps as the wire gets thicker: the first row whose `upToMm` is not below d applies. */
export interface SteppedModulus {
  readonly steps: readonly { readonly upToMm: number, readonly valueMpa: number }[]
  readonly origin: Origin
  readonly source: string
}

/** Least tensile strength by wire diameter. */
export interface StrengthModel {
  /** MPa for a diameter inside the range; never called outside it. */
  readonly minimumMpa: (wireDiameterMm: number) => number
  readonly rangeMm: { readonly min: number, readonly max: number }
  readonly origin: Origin
  readonly source: string
}

/** Families share static limits, fatigue reading and behaviour with heat. */
export type MaterialFamily = 'cold-drawn-carbon' | 'tempered-steel' | 'stainless' | 'copper-alloy'

export interface Material {
  readonly code: MaterialCode
  readonly name: string
  readonly standard: string
  readonly family: MaterialFamily
  /** MPa at 20 °C. */
  readonly youngsModulus: SourcedValue | SteppedModulus
  /** MPa at 20 °C. */
  readonly shearModulus: SourcedValue | SteppedModulus
  readonly densityKgPerM3: SourcedValue
  readonly temperatureLimitC: SourcedValue
  readonly strength: StrengthModel
  /** Loss of G and E for each kelvin over 20 °C, as a fraction. */
  readonly modulusLossPerKelvin: SourcedValue
  readonly stressRelief: {
    readonly temperatureC: number
    readonly minutes: number
    readonly origin: Origin
    readonly source: string
  }
  readonly corrosionNote: string
  /** False where plain steel rusts without a finish. */
  readonly resistsCorrosion: boolean
}

/** A least strength, or the reason why there is none. */
export type StrengthResult =
  | { readonly known: true, readonly minimumMpa: number }
  | { readonly known: false, readonly reason: string }
