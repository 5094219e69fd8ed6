import { createHash } from 'node:crypto'

const FIXED = {
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'no-referrer',
  'x-frame-options': 'DENY',
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'permissions-policy': 'camera=(), geolocation=(), microphone=(), payment=()',
} as const

const INLINE_SCRIPT = /<script(?![^>]*\ssrc=)([^>]*)>([\s\S]*?)<\/script>/g

/**
 * The content policy of a page: its own files, and those inline scripts that the renderer wrote, by their hashes.
 * @param frame what the renderer puts around the page's own body; a script inside the body is nobody's, and gets no hash
 */
export function contentPolicy(frame: string, payHost: string): string {
  const hashes = new Set<string>()
  for (const [, attributes, code] of frame.matchAll(INLINE_SCRIPT)) {
    if (code && !/type="application\/json"/.test(attributes ?? '')) hashes.add(`'sha256-${createHash('sha256').update(code).digest('base64')}'`)
  }
  return [
    `default-src 'none'`, `script-src 'self' ${[...hashes].join(' ')}`.trim(), `style-src 'self'`, `style-src-attr 'unsafe-inline'`, `img-src 'self' data:`, `font-src 'self'`,
    `connect-src 'self'`, `manifest-src 'self'`, `form-action 'self' ${payHost}`, `frame-ancestors 'none'`, `base-uri 'none'`, `object-src 'none'`,
  ].join('; ')
}

/** Hashes instead of nonces, because a page that is rendered once and kept cannot carry a nonce of each request. */
export default defineNitroPlugin((nitro) => {
  const settings = useSettings()
  const payHost = settings.stripe.host ? `${settings.stripe.protocol}://${settings.stripe.host}:${settings.stripe.port}` : 'https://checkout.stripe.com'
  nitro.hooks.hook('request', (event) => {
    setResponseHeaders(event, FIXED)
    // Only for data: on a page it would come along with 304 Not Modified, and the browser would put it in place of the page's own.
    if (event.path.startsWith('/api/')) setResponseHeader(event, 'content-security-policy', `default-src 'none'; frame-ancestors 'none'`)
    if (settings.mode === 'production') setResponseHeader(event, 'strict-transport-security', 'max-age=63072000; includeSubDomains')
  })
  nitro.hooks.hook('render:html', ({ head, bodyAppend }, { event }) => {
    event.context.pageFrame = [...head, ...bodyAppend].join('')
  })
  nitro.hooks.hook('render:response', (response, { event }) => {
    if (typeof response.body !== 'string' || !response.headers) return
    response.headers['content-security-policy'] = contentPolicy(event.context.pageFrame ?? '', payHost)
  })
})
