import type { BenchSheet } from '#shared/schemas/shop'
import type { StoredDesign } from '#shared/schemas/quote'
import { getMaterial } from '#shared/spring/materials'

/** The set-up values of a design, for the bench and the traveller. `wirePlannedKg` is the mass set aside for the job. */
export function toSheet(design: StoredDesign, wirePlannedKg: number): BenchSheet {
  const { evaluation } = design
  const relief = getMaterial(design.material).stressRelief
  return {
    material: design.materialName, wireDiameterMm: design.wireDiameterMm, meanDiameterMm: design.meanDiameterMm,
    outerDiameterMm: evaluation.outerDiameterMm, innerDiameterMm: evaluation.innerDiameterMm, activeCoils: design.activeCoils, totalCoils: design.totalCoils,
    freeLengthMm: design.freeLengthMm, pitchMm: evaluation.pitchMm, wireLengthMm: evaluation.wireLengthMm, hand: design.hand === 'left' ? 'left-hand' : 'right-hand', ends: design.ends,
    stressRelief: `${relief.temperatureC} °C, ${relief.minutes} min`, wirePlannedKg,
    loads: evaluation.points.map(point => ({ lengthMm: point.lengthMm, forceN: point.forceN })),
  }
}
