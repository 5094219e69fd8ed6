import type { EvaluateRequest, EvaluateResponse } from '#shared/schemas/spring'
import { evaluateSpring as evaluate } from '#shared/spring/mechanics/evaluate-spring'

/** Every computed value and check of a spring that is fully described. */
export const evaluateSpring = (request: EvaluateRequest): EvaluateResponse => evaluate(request)
