export type PlanningErrorCode =
  | 'calendar-unreadable' | 'never-open' | 'duration-unreadable' | 'interval-unreadable' | 'no-centre' | 'minutes-missing' | 'date-unreadable'

/** A refusal of the planning engine. `message` can be shown to staff; `subject` names the centre, operation or value at fault. */
export class PlanningError extends Error {
  constructor(readonly code: PlanningErrorCode, message: string, readonly subject: string) {
    super(message)
    this.name = 'PlanningError'
  }
}
