import type { StoredDesign } from '#shared/schemas/quote'
import type { UnitSystem } from '#shared/units/convert'
import { formatAngle, formatForce, formatLength, formatMoment } from '#shared/units/format'

/** What a design gives at its points: `60.3 N at 50.0 mm`, or `298 N·mm at 30.0°`. */
export function loadWords({ kind, evaluation }: Pick<StoredDesign, 'kind' | 'evaluation'>, units: UnitSystem): string[] {
  if (kind === 'torsion' && evaluation.kind === 'torsion') return evaluation.points.map(({ momentNmm, angleDeg }) => `${formatMoment(momentNmm, units)} at ${formatAngle(angleDeg)}`)
  return evaluation.kind === 'torsion' ? [] : evaluation.points.map(({ forceN, lengthMm }) => `${formatForce(forceN, units)} at ${formatLength(lengthMm, units)}`)
}
