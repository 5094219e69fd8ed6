/** Which API request caused something; both null when a person on the pay page or time did. */
export interface Cause { requestId: string | null, idempotencyKey: string | null }

/** The cause of what happens without an API request. */
export const NO_REQUEST: Cause = { requestId: null, idempotencyKey: null }
