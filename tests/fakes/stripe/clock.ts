/** The fake's own time, which the control interface can move so that sessions and keys grow old in a test. */
export interface FakeClock {
  /** Milliseconds since the epoch, offset included. */
  nowMs: () => number
  /** Whole seconds since the epoch, offset included. */
  nowS: () => number
}

/** A clock that adds the offset (seconds) read from the state at each call. */
export function createClock(readOffsetS: () => number): FakeClock {
  const nowMs = () => Date.now() + readOffsetS() * 1000
  return { nowMs, nowS: () => Math.floor(nowMs() / 1000) }
}
