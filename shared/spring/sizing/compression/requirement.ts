import type { RequirementProblem } from '../requirement-problem'
import type { LoadPoint } from '../types'

interface Requirement {
  readonly points: readonly LoadPoint[]
  readonly rateNPerMm?: number | undefined
  readonly freeLengthMm?: number | undefined
  readonly fit?: { readonly maxFreeLengthMm?: number | undefined } | undefined
}

/** What is missing, given twice or impossible in a requirement before any wire is tried; empty when nothing is. */
export function checkCompressionRequirement({ points, rateNPerMm, freeLengthMm, fit }: Requirement): RequirementProblem[] {
  const problems: RequirementProblem[] = []
  const [first, second] = points
  const longest = fit?.maxFreeLengthMm

  if (!first && (rateNPerMm === undefined || freeLengthMm === undefined)) {
    problems.push({
      path: ['points'],
      message: 'Say what the spring must do: two loads at two lengths, one load and a rate, or a rate and a free length.',
    })
  }
  if (first && second) {
    if (second.lengthMm >= first.lengthMm) {
      problems.push({
        path: ['points', 1, 'lengthMm'],
        message: `The second length (${second.lengthMm} mm) must be shorter than the first (${first.lengthMm} mm).`,
      })
    }
    if (second.forceN <= first.forceN) {
      problems.push({
        path: ['points', 1, 'forceN'],
        message: `The second force (${second.forceN} N) must be greater than the first (${first.forceN} N): the shorter the spring, the harder it pushes.`,
      })
    }
    if (rateNPerMm !== undefined) {
      problems.push({ path: ['rateNPerMm'], message: 'Two loads at two lengths already fix the rate: leave the rate out, or one load.' })
    }
    if (freeLengthMm !== undefined) {
      problems.push({ path: ['freeLengthMm'], message: 'Two loads at two lengths already fix the free length: leave it out, or one load.' })
    }
  } else if (first && rateNPerMm !== undefined && freeLengthMm !== undefined) {
    problems.push({ path: ['freeLengthMm'], message: 'A load at a length and a rate already fix the free length: leave one of the three out.' })
  }
  if (freeLengthMm !== undefined) {
    points.forEach((point, i) => {
      if (point.lengthMm >= freeLengthMm) {
        problems.push({
          path: ['points', i, 'lengthMm'],
          message: `The length under load (${point.lengthMm} mm) must be shorter than the free length (${freeLengthMm} mm).`,
        })
      }
    })
    if (longest !== undefined && freeLengthMm > longest) {
      problems.push({
        path: ['freeLengthMm'],
        message: `The free length (${freeLengthMm} mm) is longer than the longest free length allowed (${longest} mm).`,
      })
    }
  }
  if (longest !== undefined && first && first.lengthMm >= longest) {
    problems.push({
      path: ['fit', 'maxFreeLengthMm'],
      message: `The longest free length (${longest} mm) must exceed the length under load (${first.lengthMm} mm).`,
    })
  }
  return problems
}

