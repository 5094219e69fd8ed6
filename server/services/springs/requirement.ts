import type { CompressionRequirement, ExtensionRequirement, Requirement, TorsionRequirement } from '#shared/schemas/enquiry'
import type { WorkingPoint } from '#shared/schemas/quote'
import type { CoilHand } from '#shared/spring/codes'
import type { LoadPoint, MomentPoint, SpringSizeRequest } from '#shared/spring/sizing/types'

/** Steps a coiler is set in: quarter coils and tenths of a millimetre (common practice, no source). */
const COIL_STEP = 0.25
const DIAMETER_STEP_MM = 0.1

function compressionPoints(need: CompressionRequirement['need']): LoadPoint[] {
  switch (need.knows) {
    case 'two-loads': return [need.first, need.second].map(({ lengthMm, forceN }) => ({ lengthMm, forceN }))
    case 'load-and-rate': return [{ lengthMm: need.load.lengthMm, forceN: need.load.forceN }]
    case 'rate-and-length': return [{ lengthMm: need.shortestLengthMm, forceN: need.rateNPerMm * (need.freeLengthMm - need.shortestLengthMm) }]
  }
}

const extensionPoints = (need: ExtensionRequirement['need']): LoadPoint[] =>
  (need.knows === 'two-loads' ? [need.first, need.second] : [need.load]).map(({ lengthMm, forceN }) => ({ lengthMm, forceN }))

const torsionPoints = (need: TorsionRequirement['need']): MomentPoint[] =>
  (need.knows === 'two-moments' ? [need.first, need.second] : [need.load]).map(({ angleDeg, momentNmm }) => ({ angleDeg, momentNmm }))

/** The loads at lengths, or moments at angles, that a need states or implies, in order of rising load. */
export function workingPointsOf(requirement: Requirement): WorkingPoint[] {
  switch (requirement.kind) {
    case 'compression': return compressionPoints(requirement.need)
    case 'extension': return extensionPoints(requirement.need)
    case 'torsion': return torsionPoints(requirement.need)
  }
}

/** A customer's requirement as the search takes it. */
export function sizeRequestOf(requirement: Requirement, limit: number): SpringSizeRequest {
  const common = {
    toleranceGrade: requirement.toleranceGrade,
    temperatureC: requirement.hottestC,
    duty: { cycles: requirement.strokes, strokesPerMinute: requirement.strokesPerMinute },
    surroundings: requirement.surroundings,
    coilStep: COIL_STEP,
    diameterStepMm: DIAMETER_STEP_MM,
    limit,
  }
  const fit = { boreMm: requirement.boreMm, rodMm: requirement.rodMm, maxFreeLengthMm: requirement.maxFreeLengthMm }
  switch (requirement.kind) {
    case 'compression': return {
      ...common, kind: 'compression', points: compressionPoints(requirement.need), ends: requirement.ends, fit: { ...fit, maxSolidLengthMm: requirement.maxSolidLengthMm },
      rateNPerMm: requirement.need.knows === 'load-and-rate' ? requirement.need.rateNPerMm : undefined,
      freeLengthMm: requirement.need.knows === 'rate-and-length' ? requirement.need.freeLengthMm : undefined,
    }
    case 'extension': return {
      ...common, kind: 'extension', points: extensionPoints(requirement.need), hook: { form: requirement.hook }, fit,
      rateNPerMm: requirement.need.knows === 'load-and-rate' ? requirement.need.rateNPerMm : undefined,
      freeLengthMm: requirement.need.knows === 'load-and-length' ? requirement.need.freeLengthMm : undefined,
    }
    case 'torsion': return {
      ...common, kind: 'torsion', points: torsionPoints(requirement.need), fit,
      legs: [requirement.firstLegMm, requirement.secondLegMm].map(lengthMm => ({ lengthMm, form: requirement.legForm })), loadOpens: requirement.load === 'opens',
      rateNmmPerDeg: requirement.need.knows === 'moment-and-rate' ? requirement.need.rateNmmPerDeg : undefined,
    }
  }
}

/** The direction it is coiled in: right unless the customer says left, as most springs are (common practice, no source). */
export const handOf = ({ hand }: Pick<Requirement, 'hand'>): CoilHand => hand === 'left' ? 'left' : 'right'
