import type { RequirementProblem } from '../requirement-problem'
import type { ExtensionSizeRequest } from '../types'

/** What is missing, given twice or impossible before any wire is tried; empty when nothing is. Lengths are inside the hooks. */
export function checkExtensionRequirement({ points, rateNPerMm, freeLengthMm, fit }: Pick<ExtensionSizeRequest, 'points' | 'rateNPerMm' | 'freeLengthMm' | 'fit'>): RequirementProblem[] {
  const problems: RequirementProblem[] = []
  const [first, second] = points
  const longest = fit?.maxFreeLengthMm
  if (!first && (rateNPerMm === undefined || freeLengthMm === undefined)) {
    return [{ path: ['points'], message: 'Say what the spring must do: two loads at two lengths inside the hooks, one load with a rate or a free length, or a rate and a free length.' }]
  }
  if (first && second) {
    if (second.lengthMm <= first.lengthMm) {
      problems.push({ path: ['points', 1, 'lengthMm'], message: `The second length (${second.lengthMm} mm) must be longer than the first (${first.lengthMm} mm).` })
    }
    if (second.forceN <= first.forceN) {
      problems.push({ path: ['points', 1, 'forceN'], message: `The second force (${second.forceN} N) must be greater than the first (${first.forceN} N): the longer the spring, the harder it pulls.` })
    }
    if (rateNPerMm !== undefined) problems.push({ path: ['rateNPerMm'], message: 'Two loads at two lengths already fix the rate: leave the rate out, or one load.' })
    if (freeLengthMm !== undefined) problems.push({ path: ['freeLengthMm'], message: 'Two loads at two lengths leave the free length to the search: leave it out, or one load.' })
  } else if (first && rateNPerMm !== undefined && freeLengthMm !== undefined) {
    problems.push({ path: ['freeLengthMm'], message: 'A load at a length and a rate leave the free length to the search: leave one of the two out.' })
  }
  if (first && freeLengthMm !== undefined && first.lengthMm <= freeLengthMm) {
    problems.push({ path: ['points', 0, 'lengthMm'], message: `The length under load (${first.lengthMm} mm) must be longer than the free length (${freeLengthMm} mm).` })
  }
  if (freeLengthMm !== undefined && longest !== undefined && freeLengthMm > longest) {
    problems.push({ path: ['freeLengthMm'], message: `The free length (${freeLengthMm} mm) is longer than the longest free length allowed (${longest} mm).` })
  }
  return problems
}
