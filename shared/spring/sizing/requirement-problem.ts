/** A requirement that no spring can meet, at its path, in words that say what would put it right. */
export interface RequirementProblem {
  readonly path: readonly (string | number)[]
  readonly message: string
}
