import type { H3Event } from 'h3'
import { signOut } from '../services/sessions/own-sessions'

const NAME = '__Host-sid'
/** Tells the pages that somebody is signed in; it is no secret and opens nothing. */
const MARKER = 'auth.token'

/** The secret of the session cookie, or undefined. */
export const readSessionCookie = (event: H3Event): string | undefined => getCookie(event, NAME)

/** Ends the session this browser had until now: whoever signs in anew does not leave one behind. */
export async function endFormerSession(event: H3Event): Promise<void> {
  const secret = readSessionCookie(event)
  if (secret) await signOut(useDatabase(), secret)
}

/** Lax, not strict: the customer must still be signed in when coming back from the payment page. */
export function setSessionCookie(event: H3Event, secret: string, maxAgeS: number): void {
  setCookie(event, NAME, secret, { httpOnly: true, secure: true, sameSite: 'lax', path: '/', maxAge: maxAgeS })
  setCookie(event, MARKER, 'cookie', { httpOnly: false, secure: true, sameSite: 'lax', path: '/', maxAge: maxAgeS })
}

export function clearSessionCookie(event: H3Event): void {
  deleteCookie(event, NAME, { httpOnly: true, secure: true, sameSite: 'lax', path: '/' })
  deleteCookie(event, MARKER, { httpOnly: false, secure: true, sameSite: 'lax', path: '/' })
}
