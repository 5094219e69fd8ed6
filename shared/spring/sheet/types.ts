import type { SpringKind } from '../codes'
import type { Check, Tolerance } from '../mechanics/types'

/** How a number of the sheet is written: its quantity, and how finely. Lengths come in three degrees of fineness. */
export type SheetQuantity =
  | 'wire' | 'length' | 'fineLength' | 'force' | 'rate' | 'moment' | 'momentRate' | 'angle' | 'stress' | 'mass' | 'temperature'
  | 'coils' | 'ratio' | 'share' | 'cycles' | 'perMinute' | 'frequency' | 'speed' | 'density' | 'perKelvin'

/**
 * One value with everything that is needed to trust it. Symbols and formulas are written with `_` before an index and `^` before
 * a power: `L_0`, `R = G d^4/(8 D^3 n)`.
 */
export interface SheetRow {
  /** The field of the request or the evaluation that it shows, such as `solid.forceN`; `material.` where it comes from the material's data. */
  readonly field: string
  readonly symbol: string
  readonly name: string
  /** A word instead of a number for a choice; null where there is no such value. */
  readonly value: number | string | null
  readonly quantity: SheetQuantity
  /** How it follows; empty where it is given. */
  readonly formula: string
  /** The standard, book or practice; 'given' for what was typed. */
  readonly basis: string
  /** For people who do not know the term. */
  readonly words?: string
}

export interface SheetGroup {
  readonly title: string
  readonly rows: readonly SheetRow[]
}

/** A column of the working points. */
export interface SheetColumn {
  readonly field: string
  readonly symbol: string
  readonly name: string
  readonly quantity: SheetQuantity
  readonly formula: string
  readonly basis: string
}

export interface SheetPoints {
  readonly columns: readonly SheetColumn[]
  /** One list of values for each point, in the order of the columns. */
  readonly rows: readonly (readonly (number | null)[])[]
}

export interface SheetTolerance extends Tolerance {
  readonly symbol: string
  readonly name: string
  readonly unit: SheetQuantity
}

export interface SheetCheck extends Check {
  readonly name: string
  /** Of the value and its limit; null where the check has no number. */
  readonly unit: SheetQuantity | null
}

/** Everything a data sheet says, in the order in which it is printed. */
export interface SpringSheet {
  readonly kind: SpringKind
  readonly title: string
  /** Where the order of the data comes from. */
  readonly order: string
  readonly groups: readonly SheetGroup[]
  readonly points: SheetPoints
  readonly checks: readonly SheetCheck[]
  readonly tolerances: readonly SheetTolerance[]
  readonly assumptions: readonly string[]
  readonly cautions: readonly string[]
}
