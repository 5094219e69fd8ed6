import type { Currency } from '#shared/money'
import type { SpringKind } from '#shared/spring/codes'

/** What the gate must know of the requirement. Temperatures °C, strokes in the spring's life. */
export interface GateRequirement {
  couldHurt: boolean
  coldestC: number
  hottestC: number
  strokes: number
  toleranceGrade: 1 | 2 | 3
  surroundings: string
  /** Finish asked for; absent or `none` asks for nothing beyond oiled. */
  finish?: string
  /** ISO date. */
  neededOn?: string
}

export interface GateCheck {
  code: string
  ok: boolean
  severity: 'stop' | 'caution' | 'note'
  message: string
}

/** The design that was found, with its whole check. */
export interface GateDesign {
  kind: SpringKind
  material: string
  wireDiameterMm: number
  springIndex: number
  /** Free length over mean diameter of a spring that is pressed; nought for the others, which cannot bow. */
  slenderness: number
  /** What it holds at its greatest working load and lets go of at once if a hook breaks or a leg slips; nought without one. */
  storedEnergyJ: number
  checks: readonly GateCheck[]
}

/** One rung of the ladder. */
export interface GateRung {
  quantity: number
  netMinor: number
  currency: Currency
  /** ISO date, null where no date could be found. */
  dispatchOn: string | null
}

export type GateCode =
  | 'could-hurt' | 'nothing-fits' | 'check-failed' | 'caution' | 'index' | 'wire-range' | 'slenderness' | 'stored-energy' | 'tolerance-grade' | 'life'
  | 'quantity' | 'order-value' | 'material' | 'finish' | 'surroundings' | 'temperature' | 'needed-on'

/** Why an enquiry waits for a person: a sentence for each side. */
export interface GateReason {
  code: GateCode
  customerText: string
  estimatorText: string
}
