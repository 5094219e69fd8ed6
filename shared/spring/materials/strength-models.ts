import type { Origin, StrengthModel } from './types'

/** Rows of an over-to table: the first row whose `upToMm` is not below d applies, as the EN tables are read. */
export interface StrengthRow {
  readonly upToMm: number
  readonly minimumMpa: number
}

/** Strength from an over-to table. */
export function tabulatedStrength(overMm: number, rows: readonly StrengthRow[], origin: Origin, source: string): StrengthModel {
  const last = rows[rows.length - 1]
  if (!last) throw new Error('A strength table needs at least one row')
  return {
    minimumMpa: (d) => rows.find(row => d <= row.upToMm)?.minimumMpa ?? last.minimumMpa,
    rangeMm: { min: overMm, max: last.upToMm },
    origin,
    source,
  }
}

/** Strength Rm = a - b lg d, rounded to 10 MPa as EN 10270-1 does, with the printed value where a row was found. */
export function logarithmicStrength(options: {
  readonly a: number
  readonly b: number
  readonly rangeMm: { readonly min: number, readonly max: number }
  readonly capMpa?: number
  readonly printed: Readonly<Record<string, number>>
  readonly origin: Origin
  readonly source: string
}): StrengthModel {
  const printed = new Map(Object.entries(options.printed).map(([d, value]) => [Number(d), value]))
  return {
    minimumMpa: (d) => {
      const fromTable = printed.get(d)
      if (fromTable !== undefined) return fromTable
      const fromFormula = Math.round((options.a - options.b * Math.log10(d)) / 10) * 10
      return Math.min(fromFormula, options.capMpa ?? Infinity)
    },
    rangeMm: options.rangeMm,
    origin: options.origin,
    source: options.source,
  }
}

/** Strength Sut = A / d^m, by bands of diameter (ASTM wire, as the textbooks tabulate it). */
export function powerStrength(
  bands: readonly { readonly upToMm: number, readonly aMpa: number, readonly m: number }[],
  minMm: number,
  origin: Origin,
  source: string,
): StrengthModel {
  const last = bands[bands.length - 1]
  if (!last) throw new Error('A strength formula needs at least one band')
  return {
    minimumMpa: (d) => {
      const band = bands.find(row => d <= row.upToMm) ?? last
      return band.aMpa / d ** band.m
    },
    rangeMm: { min: minMm, max: last.upToMm },
    origin,
    source,
  }
}
