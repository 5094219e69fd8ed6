/** Kinds of spring the house knows. */
export const SPRING_KINDS = ['compression', 'extension', 'torsion'] as const
export type SpringKind = (typeof SPRING_KINDS)[number]

/** Forms of the two end coils of a compression spring. */
export const COMPRESSION_ENDS = ['closed-ground', 'closed', 'open', 'open-ground'] as const
export type CompressionEnds = (typeof COMPRESSION_ENDS)[number]

/** How the two ends of an extension spring are bent: a whole turn, half a turn, a loop crossed to the middle, a loop on a straight shank. */
export const HOOK_FORMS = ['full-loop', 'half-loop', 'crossover-loop', 'extended-hook'] as const
export type HookForm = (typeof HOOK_FORMS)[number]

/** How a leg leaves the body of a torsion spring: straight out along the axis, or as a tangent of the coil. */
export const LEG_FORMS = ['straight', 'tangential'] as const
export type LegForm = (typeof LEG_FORMS)[number]

/** How the stress is corrected and which static limits go with it. */
export const STRESS_METHODS = ['en13906', 'wahl'] as const
export type StressMethod = (typeof STRESS_METHODS)[number]

/** Quality grades of EN 15800; 2 applies where none is stated. */
export const TOLERANCE_GRADES = [1, 2, 3] as const
export type ToleranceGrade = (typeof TOLERANCE_GRADES)[number]

/** Seating coefficients of EN 13906-1 (both ends fixed, one hinged, both hinged, one free). */
export const SEATING_COEFFICIENTS = [0.5, 0.707, 1, 2] as const
export type SeatingCoefficient = (typeof SEATING_COEFFICIENTS)[number]

export const COIL_HANDS = ['left', 'right'] as const
export type CoilHand = (typeof COIL_HANDS)[number]

/** Where the spring lives. */
export const SURROUNDINGS = ['dry', 'damp', 'outdoors', 'salt', 'food', 'chemical'] as const
export type Surroundings = (typeof SURROUNDINGS)[number]

/** Wire materials with strength data by diameter. */
export const MATERIAL_CODES = [
  'EN10270-1-SL',
  'EN10270-1-SM',
  'EN10270-1-SH',
  'EN10270-2-FDC',
  'EN10270-2-FDSiCr',
  'EN10270-2-VDSiCr',
  'EN10270-3-1.4310',
  'EN10270-3-1.4310-HS',
  'EN10270-3-1.4401',
  'EN10270-3-1.4568',
  'ASTM-A228',
  'ASTM-A229',
  'ASTM-A227',
  'ASTM-A232',
  'ASTM-A401',
  'ASTM-A313-302',
  'ASTM-A313-316',
  'ASTM-A313-631',
  'ASTM-B159',
  'ASTM-B197',
] as const
export type MaterialCode = (typeof MATERIAL_CODES)[number]
