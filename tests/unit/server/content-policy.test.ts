import { createHash } from 'node:crypto'
import { beforeAll, describe, expect, it, vi } from 'vitest'

type Hook = (subject: { body?: string | string[], headers?: Record<string, string>, head?: string[], bodyPrepend?: string[], bodyAppend?: string[] }, context: { event: { context: Record<string, unknown> } }) => void
const hooks = new Map<string, Hook>()

/** The plugin as Nitro would start it, with the names that Nitro supplies. */
beforeAll(async () => {
  vi.stubGlobal('useSettings', () => ({ mode: 'demo', stripe: { host: '127.0.0.1', port: 4001, protocol: 'http' } }))
  vi.stubGlobal('defineNitroPlugin', (plugin: (nitro: unknown) => void) => plugin({ hooks: { hook: (name: string, hook: Hook) => hooks.set(name, hook) } }))
  await import('#server/plugins/security-headers')
})

const hashOf = (code: string) => `'sha256-${createHash('sha256').update(code).digest('base64')}'`

function policyOf(page: { head: string[], body: string[], bodyAppend: string[] }): string {
  const event = { context: {} }
  const response = { body: [...page.head, ...page.body, ...page.bodyAppend].join(''), headers: {} as Record<string, string> }
  hooks.get('render:html')!(page, { event })
  hooks.get('render:response')!(response, { event })
  return response.headers['content-security-policy'] ?? ''
}

describe('the content policy of a page (S-21)', () => {
  it('lets the renderer\'s own inline scripts run, and no data or file is counted among them', () => {
    const policy = policyOf({
      head: ['<script type="importmap">{"imports":{}}</script>', '<script type="module" src="/_nuxt/a.js" crossorigin></script>'], body: ['<div id="__nuxt"></div>'],
      bodyAppend: ['<script type="application/json" id="__NUXT_DATA__">[1]</script><script>window.__NUXT__={}</script>'],
    })
    expect(policy).toContain(`script-src 'self' ${hashOf('{"imports":{}}')} ${hashOf('window.__NUXT__={}')};`)
    expect(policy).toContain(`form-action 'self' http://127.0.0.1:4001;`)
  })

  it('lets no script run that got into the body of the page', () => {
    const policy = policyOf({ head: [], body: ['<div id="__nuxt"><script>steal()</script></div>'], bodyAppend: ['<script>window.__NUXT__={}</script>'] })
    expect(policy).not.toContain(hashOf('steal()'))
    expect(policy).toContain(hashOf('window.__NUXT__={}'))
  })

  it('lets no inline script run where nothing was rendered', () => {
    const response = { body: '<script>steal()</script>', headers: {} as Record<string, string> }
    hooks.get('render:response')!(response, { event: { context: {} } })
    expect(response.headers['content-security-policy']).toContain(`script-src 'self';`)
  })
})
