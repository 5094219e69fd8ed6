import type { CompressionEnds, HookForm, LegForm, MaterialCode, SpringKind, Surroundings, ToleranceGrade } from '#shared/spring/codes'

/** The choices of the order form in plain words; also how the quote says what was chosen. */
export const SURROUNDINGS_WORDS: Readonly<Record<Surroundings, string>> = {
  dry: 'Dry, indoors', damp: 'Damp, indoors', outdoors: 'Outdoors', salt: 'Salt', food: 'Food', chemical: 'Chemicals',
}
export const ENDS_WORDS: Readonly<Record<CompressionEnds, string>> = {
  'closed-ground': 'Closed and ground', 'closed': 'Closed, not ground', 'open': 'Open', 'open-ground': 'Open and ground',
}
export const KIND_WORDS: Readonly<Record<SpringKind, string>> = { compression: 'Compression spring', extension: 'Extension spring', torsion: 'Torsion spring' }
export const HOOK_CHOICES: Readonly<Record<HookForm, string>> = {
  'full-loop': 'A whole loop over the middle', 'half-loop': 'Half a loop, short', 'crossover-loop': 'A loop crossed to the middle', 'extended-hook': 'A hook on a straight piece',
}
export const LEG_CHOICES: Readonly<Record<LegForm, string>> = { tangential: 'Straight off the coil', straight: 'Along the axis' }
export const LOAD_CHOICES = { 'winds-up': 'The load winds it up, as it should', 'opens': 'The load opens it' } as const
export const TOLERANCE_WORDS: Readonly<Record<ToleranceGrade, string>> = { 1: 'Grade 1, fine', 2: 'Grade 2, usual', 3: 'Grade 3, coarse' }
export const HAND_WORDS = { either: 'Either', right: 'Right', left: 'Left' } as const

/** Materials with the designation of their standard in the second part. */
export const MATERIAL_WORDS: Readonly<Record<MaterialCode, string>> = {
  'EN10270-1-SL': 'Spring steel, light duty: EN 10270-1 SL',
  'EN10270-1-SM': 'Spring steel, medium duty: EN 10270-1 SM',
  'EN10270-1-SH': 'Spring steel, high duty: EN 10270-1 SH',
  'EN10270-2-FDC': 'Oil-tempered steel: EN 10270-2 FDC',
  'EN10270-2-FDSiCr': 'Silicon chrome, oil-tempered: EN 10270-2 FDSiCr',
  'EN10270-2-VDSiCr': 'Silicon chrome for valves: EN 10270-2 VDSiCr',
  'EN10270-3-1.4310': 'Stainless steel: EN 10270-3 1.4310',
  'EN10270-3-1.4310-HS': 'Stainless steel, high strength: EN 10270-3 1.4310 HS',
  'EN10270-3-1.4401': 'Stainless steel, against salt: EN 10270-3 1.4401',
  'EN10270-3-1.4568': 'Stainless steel, hardened: EN 10270-3 1.4568',
  'ASTM-A228': 'Music wire: ASTM A228',
  'ASTM-A229': 'Oil-tempered steel: ASTM A229',
  'ASTM-A227': 'Hard-drawn steel: ASTM A227',
  'ASTM-A232': 'Chrome vanadium: ASTM A232',
  'ASTM-A401': 'Chrome silicon: ASTM A401',
  'ASTM-A313-302': 'Stainless steel: ASTM A313, type 302',
  'ASTM-A313-316': 'Stainless steel, against salt: ASTM A313, type 316',
  'ASTM-A313-631': 'Stainless steel, hardened: ASTM A313, type 631 (17-7 PH)',
  'ASTM-B159': 'Phosphor bronze: ASTM B159',
  'ASTM-B197': 'Beryllium copper: ASTM B197',
}
