import type { EvaluateRequest, EvaluateResponse } from '#shared/schemas/spring'
import { evaluateCompression } from '#shared/spring/mechanics'

/** Every computed value and check of a spring that is fully described. */
export const evaluateSpring = (request: EvaluateRequest): EvaluateResponse => evaluateCompression(request) as EvaluateResponse
