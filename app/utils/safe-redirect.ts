/** A path of our own to go on to, or null: nothing that a browser could take for another site (`//host`, `/\host`, a scheme). */
export function safeRedirect(given: unknown): string | null {
  if (typeof given !== 'string' || !/^\/(?![/\\])/.test(given) || /[\u0000-\u001f\\]/.test(given)) return null
  const url = new URL(given, 'http://own.invalid')
  return url.origin === 'http://own.invalid' ? url.pathname + url.search + url.hash : null
}
