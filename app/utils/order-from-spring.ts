import type { EvaluateRequest } from '#shared/schemas/spring'
import type { SpringEvaluation } from '#shared/spring'
import type { UnitSystem } from '#shared/units/convert'
import type { OrderDraft } from './order-draft'

/** A number as a field of the order form shows it: six figures are more than any of them needs. */
const typed = (value: number): string => String(Number(value.toPrecision(6)))

/** What the order form can take over from a spring worked out: its kind, two loads or moments, the material, and where it works. In mm, N and degrees. */
export function draftFromSpring(spring: EvaluateRequest, { points }: SpringEvaluation): Partial<OrderDraft> {
  const { fit = {}, duty = {} } = spring
  const one = (value: number | undefined, name: keyof OrderDraft) => (value === undefined ? {} : { [name]: typed(value) })
  const common: Partial<OrderDraft> = { kind: spring.kind, material: spring.material, ...one(fit.boreMm, 'bore'), ...one(fit.rodMm, 'rod'), ...one(duty.cycles, 'strokes'), ...one(duty.strokesPerMinute, 'strokesPerMinute') }
  const first = points[0]
  const last = points.at(-1)
  if (!first || !last || first === last) return common
  if ('momentNmm' in first && 'momentNmm' in last) {
    return { ...common, knowsTorsion: 'two-moments', firstMoment: typed(first.momentNmm), firstAngle: typed(first.angleDeg), secondMoment: typed(last.momentNmm), secondAngle: typed(last.angleDeg) }
  }
  if (!('forceN' in first) || !('forceN' in last)) return common
  return { ...common, knows: 'two-loads', knowsExtension: 'two-loads', firstForce: typed(first.forceN), firstLength: typed(first.lengthMm), secondForce: typed(last.forceN), secondLength: typed(last.lengthMm) }
}

interface DraftStore {
  draft: OrderDraft
  recall: () => void
  convertTo: (units: UnitSystem) => void
  keep: (now: Date) => void
}

/** Puts a spring into the order form's draft, in the units the person reads. What else stands in the draft stays. */
export function orderFromSpring(store: DraftStore, { spring, evaluation }: { spring: EvaluateRequest, evaluation: SpringEvaluation }, units: UnitSystem): void {
  store.recall()
  store.convertTo('metric')
  store.draft = { ...store.draft, ...draftFromSpring(spring, evaluation) }
  store.convertTo(units)
  store.keep(new Date())
}
