import type { Requirement } from '#shared/schemas/enquiry'
import type { CoilHand } from '#shared/spring/codes'
import type { CompressionSizeRequest, LoadPoint } from '#shared/spring/sizing/types'

/** Steps a coiler is set in: quarter coils and tenths of a millimetre (common practice, no source). */
const COIL_STEP = 0.25
const DIAMETER_STEP_MM = 0.1

/** The loads at lengths that a need states or implies, in order of rising load. */
export function workingPointsOf({ need }: Pick<Requirement, 'need'>): LoadPoint[] {
  switch (need.knows) {
    case 'two-loads': return [need.first, need.second].map(({ lengthMm, forceN }) => ({ lengthMm, forceN }))
    case 'load-and-rate': return [{ lengthMm: need.load.lengthMm, forceN: need.load.forceN }]
    case 'rate-and-length': return [{ lengthMm: need.shortestLengthMm, forceN: need.rateNPerMm * (need.freeLengthMm - need.shortestLengthMm) }]
  }
}

/** A customer's requirement as the search takes it. One load at a length with a rate, or with a free length, fixes the rest. */
export function sizeRequestOf(requirement: Requirement, limit: number): CompressionSizeRequest {
  const { need } = requirement
  return {
    kind: 'compression',
    points: workingPointsOf(requirement),
    rateNPerMm: need.knows === 'load-and-rate' ? need.rateNPerMm : undefined,
    freeLengthMm: need.knows === 'rate-and-length' ? need.freeLengthMm : undefined,
    ends: requirement.ends,
    toleranceGrade: requirement.toleranceGrade,
    temperatureC: requirement.hottestC,
    duty: { cycles: requirement.strokes, strokesPerMinute: requirement.strokesPerMinute },
    surroundings: requirement.surroundings,
    fit: {
      boreMm: requirement.boreMm, rodMm: requirement.rodMm, maxFreeLengthMm: requirement.maxFreeLengthMm, maxSolidLengthMm: requirement.maxSolidLengthMm,
    },
    coilStep: COIL_STEP,
    diameterStepMm: DIAMETER_STEP_MM,
    limit,
  }
}

/** The direction it is coiled in: right unless the customer says left, as most springs are (common practice, no source). */
export const handOf = ({ hand }: Pick<Requirement, 'hand'>): CoilHand => hand === 'left' ? 'left' : 'right'
