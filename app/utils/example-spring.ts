/**
 * A spring for 60 N at 50 mm and 150 N at 35 mm, drawn where nobody has typed anything yet. Its sizes are those of the
 * works' own sample sheet; rate 6.03 N/mm and solid length 25.6 mm follow from them (G 81 500 MPa, n_t d).
 */
export const EXAMPLE_SPRING = {
  wireDiameterMm: 2.5, meanDiameterMm: 20, activeCoils: 8.25, totalCoils: 10.25, freeLengthMm: 60, ends: 'closed-ground', hand: 'right',
  rateNPerMm: 6.03, solidLengthMm: 25.625, leastWorkingLengthMm: 29.7,
  points: [{ lengthMm: 50, forceN: 60.3, toleranceN: 10.6 }, { lengthMm: 35, forceN: 150.7, toleranceN: 11.9 }],
} as const

/** The example as it would be typed. */
export const EXAMPLE_NEED = { knows: 'two-loads', firstForce: '60', firstLength: '50', secondForce: '150', secondLength: '35' } as const
