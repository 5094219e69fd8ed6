import { evaluateCompression } from './compression/evaluate'
import { evaluateExtension } from './extension/evaluate'
import type { EvaluationOf, InputOf, SpringEvaluation, SpringInput } from './spring'
import { evaluateTorsion } from './torsion/evaluate'
import type { EvaluationContext } from './wire-model'

/** Every computed value and check of a spring fully described, whatever its kind. Never throws for finite input. */
export function evaluateSpring(input: InputOf<'compression'>, context?: EvaluationContext): EvaluationOf<'compression'>
export function evaluateSpring(input: InputOf<'extension'>, context?: EvaluationContext): EvaluationOf<'extension'>
export function evaluateSpring(input: InputOf<'torsion'>, context?: EvaluationContext): EvaluationOf<'torsion'>
export function evaluateSpring(input: SpringInput, context?: EvaluationContext): SpringEvaluation
export function evaluateSpring(input: SpringInput, context: EvaluationContext = {}): SpringEvaluation {
  switch (input.kind) {
    case 'compression': return evaluateCompression(input, context)
    case 'extension': return evaluateExtension(input, context)
    case 'torsion': return evaluateTorsion(input, context)
  }
}
