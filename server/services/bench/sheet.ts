import type { BenchSheet } from '#shared/schemas/shop'
import type { StoredDesign } from '#shared/schemas/quote'
import { getMaterial } from '#shared/spring/materials'

/** The set-up values of a design, for the bench and the traveller. `wirePlannedKg` is the mass set aside for the job. */
export function toSheet(design: StoredDesign, wirePlannedKg: number): BenchSheet {
  const relief = getMaterial(design.material).stressRelief
  const common = {
    material: design.materialName, wireDiameterMm: design.wireDiameterMm, outerDiameterMm: design.evaluation.outerDiameterMm, innerDiameterMm: design.evaluation.innerDiameterMm,
    totalCoils: design.totalCoils, wireLengthMm: design.evaluation.wireLengthMm, hand: design.hand, stressRelief: `${relief.temperatureC} °C, ${relief.minutes} min`, wirePlannedKg,
    spring: design.spring,
  }
  switch (design.kind) {
    case 'compression': return {
      ...common, kind: 'compression', freeLengthMm: design.freeLengthMm, pitchMm: design.evaluation.pitchMm, ends: design.spring.ends ?? 'closed-ground', loads: loadsOf(design.evaluation.points),
    }
    case 'extension': return {
      ...common, kind: 'extension', insideHooksMm: design.evaluation.insideHooksFreeLengthMm, bodyLengthMm: design.evaluation.bodyLengthMm, hook: design.spring.hook?.form ?? 'full-loop',
      hookLengthMm: design.evaluation.hookLengthMm, initialTensionN: design.evaluation.initialTensionN, loads: loadsOf(design.evaluation.points),
    }
    case 'torsion': return {
      ...common, kind: 'torsion', bodyLengthMm: design.evaluation.bodyLengthMm, legs: [...design.spring.legs ?? []], rodMm: design.spring.fit?.rodMm ?? design.spring.mandrelMm ?? null,
      moments: design.evaluation.points.map(({ angleDeg, momentNmm }) => ({ angleDeg, momentNmm })),
    }
  }
}

const loadsOf = (points: readonly { lengthMm: number, forceN: number }[]) => points.map(({ lengthMm, forceN }) => ({ lengthMm, forceN }))
