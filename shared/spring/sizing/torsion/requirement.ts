import type { RequirementProblem } from '../requirement-problem'
import type { TorsionSizeRequest } from '../types'

/** What is missing, given twice or impossible before any wire is tried; empty when nothing is. */
export function checkTorsionRequirement({ points, rateNmmPerDeg }: Pick<TorsionSizeRequest, 'points' | 'rateNmmPerDeg'>): RequirementProblem[] {
  const problems: RequirementProblem[] = []
  const [first, second] = points
  if (!first) {
    return [{ path: ['points'], message: 'Say what the spring must do: two moments at two angles, one moment and a rate, or one moment at an angle from free.' }]
  }
  if (!second) return []
  if (second.angleDeg <= first.angleDeg) {
    problems.push({ path: ['points', 1, 'angleDeg'], message: `The second angle (${second.angleDeg} degrees) must be greater than the first (${first.angleDeg} degrees).` })
  }
  if (second.momentNmm <= first.momentNmm) {
    problems.push({ path: ['points', 1, 'momentNmm'], message: `The second moment (${second.momentNmm} N mm) must be greater than the first (${first.momentNmm} N mm): turned further, it turns back harder.` })
  }
  if (rateNmmPerDeg !== undefined) problems.push({ path: ['rateNmmPerDeg'], message: 'Two moments at two angles already fix the rate: leave the rate out, or one moment.' })
  return problems
}
