import { checkCompressionRequirement } from './compression/requirement'
import { checkExtensionRequirement } from './extension/requirement'
import type { RequirementProblem } from './requirement-problem'
import { checkTorsionRequirement } from './torsion/requirement'
import type { SpringSizeRequest } from './types'

/** What is missing, given twice or impossible in a request before any wire is tried; empty when nothing is. */
export function checkSizeRequirement(request: SpringSizeRequest): readonly RequirementProblem[] {
  switch (request.kind) {
    case 'compression': return checkCompressionRequirement(request)
    case 'extension': return checkExtensionRequirement(request)
    case 'torsion': return checkTorsionRequirement(request)
  }
}
