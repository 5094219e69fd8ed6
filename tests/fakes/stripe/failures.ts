/** A failure planned for coming API requests. */
export interface PlannedFailure {
  /** `answer`: an error status. `reset`: the connection breaks before anything is done. `lostAnswer`: the request is carried
   * out and then the connection breaks. `hang`: nothing is done and no answer comes for `delayMs`. `slow`: a right answer, late. */
  kind: 'answer' | 'reset' | 'lostAnswer' | 'hang' | 'slow'
  /** Status for `answer`. */
  status: number
  /** For `answer`: fields of the error object that replace the usual ones. */
  error: Record<string, string>
  /** For `answer` with a 5xx: the work is done all the same before the error is answered. */
  isExecuted: boolean
  /** For `answer`: whether an idempotency key keeps it. */
  isStored: boolean
  delayMs: number
  /** How many requests it still hits. */
  times: number
  /** Only this method, if given. */
  method: string | null
  /** Only paths that begin with this, if given. */
  pathPrefix: string | null
}

/** The failures still to come, in order. */
export interface FailurePlan {
  add: (failure: PlannedFailure) => void
  /** The first failure that hits this request; counts it as used. */
  take: (method: string, path: string) => PlannedFailure | undefined
  list: () => readonly PlannedFailure[]
  clear: () => void
}

/** A plan with nothing in it. */
export function createFailurePlan(): FailurePlan {
  const planned: PlannedFailure[] = []
  return {
    add: failure => void planned.push(failure),
    take(method, path) {
      const index = planned.findIndex(failure => (failure.method === null || failure.method === method)
        && (failure.pathPrefix === null || path.startsWith(failure.pathPrefix)))
      const failure = planned[index]
      if (failure && --failure.times <= 0) planned.splice(index, 1)
      return failure
    },
    list: () => planned,
    clear: () => void planned.splice(0),
  }
}
