/** Something to go wrong with coming deliveries. Each event uses up one turn of the first switch that fits its type. */
export interface DeliverySwitch {
  /** How many events it still bends. */
  times: number
  /** Only these event types; empty means all. */
  types: string[]
  /** Copies sent besides the first, all at the same moment. */
  extraCopies: number
  /** Holds events until so many are waiting, then sends them newest first. 0 holds none. */
  reorder: number
  /** Waits before the first attempt, while others overtake. */
  delayMs: number
  /** Loses the event: no attempt is ever made. */
  drop: boolean
  /** Signs with a wrong key. */
  badSignature: boolean
  /** Seconds added to the time stamp of the signature; negative makes it old. */
  clockOffsetS: number
  /** Sends the body in two halves with this pause. */
  bodyPauseMs: number
  /** Gives up waiting for the answer after so long, as if the receiver were slow; null keeps the usual patience. */
  answerTimeoutMs: number | null
  /** Bends retries as well; otherwise only the first attempt. */
  everyAttempt: boolean
}

/** A switch that changes nothing, to be overridden. */
export const NEUTRAL_SWITCH: DeliverySwitch = {
  times: 1,
  types: [],
  extraCopies: 0,
  reorder: 0,
  delayMs: 0,
  drop: false,
  badSignature: false,
  clockOffsetS: 0,
  bodyPauseMs: 0,
  answerTimeoutMs: null,
  everyAttempt: false,
}

/** Names of what a switch bends, for the delivery record. */
export function describeSwitch(bend: DeliverySwitch): string[] {
  return [
    bend.extraCopies > 0 ? `${bend.extraCopies} extra copies` : '',
    bend.reorder > 0 ? 'reordered' : '',
    bend.delayMs > 0 ? `delayed ${bend.delayMs} ms` : '',
    bend.drop ? 'dropped' : '',
    bend.badSignature ? 'bad signature' : '',
    bend.clockOffsetS !== 0 ? `clock ${bend.clockOffsetS} s` : '',
    bend.bodyPauseMs > 0 ? `body paused ${bend.bodyPauseMs} ms` : '',
    bend.answerTimeoutMs !== null ? `patience ${bend.answerTimeoutMs} ms` : '',
  ].filter(Boolean)
}
