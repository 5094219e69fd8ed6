/** Which units a person reads and types. Inside, everything is SI: mm, N, N/mm, N mm, MPa, g; angles are degrees. */
export type UnitSystem = 'metric' | 'inch'

/** The quantities that change their unit with the system. */
export type Quantity = 'length' | 'force' | 'rate' | 'moment' | 'momentRate' | 'angle' | 'stress' | 'mass' | 'temperature'

/** Exact by definition of the international inch (1959). */
export const MM_PER_INCH = 25.4
/** Exact: 0.45359237 kg times 9.80665 m/s2. */
export const N_PER_LBF = 4.4482216152605
/** Exact: the standard acceleration of 9.80665 m/s2 on one kilogram. */
export const N_PER_KGF = 9.80665
/** Exact by definition of the international pound (1959). */
export const G_PER_LB = 453.59237
/** N/mm in one lbf/in. */
export const N_PER_MM_PER_LBF_PER_INCH = N_PER_LBF / MM_PER_INCH
/** N mm in one lbf in. */
export const NMM_PER_LBF_INCH = N_PER_LBF * MM_PER_INCH
/** MPa in one psi: one lbf over one square inch. */
export const MPA_PER_PSI = N_PER_LBF / (MM_PER_INCH * MM_PER_INCH)

interface DisplayUnit {
  /** As written after the number. */
  readonly symbol: string
  /** SI amount in one of the unit. */
  readonly size: number
  /** SI value at which the unit reads nought; only temperature needs it. */
  readonly offset?: number
}

/** The unit each quantity is shown in, and typed in when a person names none. */
export const DISPLAY_UNITS: Record<UnitSystem, Record<Quantity, DisplayUnit>> = {
  metric: {
    length: { symbol: 'mm', size: 1 },
    force: { symbol: 'N', size: 1 },
    rate: { symbol: 'N/mm', size: 1 },
    moment: { symbol: 'N·mm', size: 1 },
    momentRate: { symbol: 'N·mm/°', size: 1 },
    angle: { symbol: '°', size: 1 },
    stress: { symbol: 'MPa', size: 1 },
    mass: { symbol: 'g', size: 1 },
    temperature: { symbol: '°C', size: 1 },
  },
  inch: {
    length: { symbol: 'in', size: MM_PER_INCH },
    force: { symbol: 'lbf', size: N_PER_LBF },
    rate: { symbol: 'lbf/in', size: N_PER_MM_PER_LBF_PER_INCH },
    moment: { symbol: 'lbf·in', size: NMM_PER_LBF_INCH },
    momentRate: { symbol: 'lbf·in/°', size: NMM_PER_LBF_INCH },
    angle: { symbol: '°', size: 1 },
    stress: { symbol: 'ksi', size: MPA_PER_PSI * 1000 },
    mass: { symbol: 'oz', size: G_PER_LB / 16 },
    temperature: { symbol: '°F', size: 5 / 9, offset: -160 / 9 },
  },
}

/** SI value to the number shown in `units`. */
export function fromSi(value: number, quantity: Quantity, units: UnitSystem): number {
  const { size, offset = 0 } = DISPLAY_UNITS[units][quantity]
  return (value - offset) / size
}

/** A number shown in `units` to its SI value. */
export function toSi(value: number, quantity: Quantity, units: UnitSystem): number {
  const { size, offset = 0 } = DISPLAY_UNITS[units][quantity]
  return value * size + offset
}

/** The symbol a quantity carries in `units`: 'mm' or 'in', 'N' or 'lbf' ... */
export function unitSymbol(quantity: Quantity, units: UnitSystem): string {
  return DISPLAY_UNITS[units][quantity].symbol
}
