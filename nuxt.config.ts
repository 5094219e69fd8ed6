import { fileURLToPath } from 'node:url'
import type { NitroConfig } from 'nitropack/types'
import { compileMailComponents } from './emails/compile-sfc'
import { listApiRoutes } from './vite/api-routes'
import { bundleThread } from './vite/bundle-thread'
import { leanEntry } from './vite/lean-entry'
import { slimFormKit } from './vite/slim-formkit'

const dayS = 86_400

// Typed here, since Nuxt's own type of this key knows only part of Nitro's settings.
const nitro: Pick<NitroConfig, 'compressPublicAssets' | 'experimental' | 'scheduledTasks' | 'rollupConfig' | 'virtual'> = {
  compressPublicAssets: true,
  experimental: { tasks: true },
  // Each process claims its work in the database, so several processes may run these side by side.
  scheduledTasks: { '*/5 * * * *': ['payments:reconcile'], '17 * * * *': ['housekeeping'] },
  rollupConfig: { plugins: [compileMailComponents()] },
  virtual: {
    '#api-routes': () => `export default ${JSON.stringify(listApiRoutes(fileURLToPath(new URL('./server/api', import.meta.url))))}`,
    '#sizing-thread': async () => `export default ${JSON.stringify(await bundleThread(fileURLToPath(new URL('./server/threads/sizing.ts', import.meta.url))))}`,
  },
}

export default defineNuxtConfig({
  compatibilityDate: '2026-05-01',
  telemetry: false,
  devtools: { enabled: false },
  modules: ['@pinia/nuxt', '@nuxtjs/tailwindcss', '@formkit/nuxt', '@sidebase/nuxt-auth'],
  css: [
    '@fontsource/work-sans/latin-400.css',
    '@fontsource/work-sans/latin-500.css',
    '@fontsource/work-sans/latin-600.css',
    '@fontsource/work-sans/latin-700.css',
  ],
  tailwindcss: { cssPath: '~/assets/css/tailwind.css', viewer: false },
  formkit: { autoImport: true },
  typescript: { strict: true, typeCheck: false },
  // Inline styles would need 'unsafe-inline' in the content policy.
  features: { inlineStyles: false },
  // Other pages' code is fetched when somebody reaches for their link, not with the first page.
  experimental: { payloadExtraction: false, appManifest: false, defaults: { nuxtLink: { prefetchOn: { visibility: false, interaction: true } } } },
  hooks: {
    'build:manifest': (manifest) => {
      for (const entry of Object.values(manifest)) entry.dynamicImports = []
    },
  },
  vite: { plugins: [slimFormKit(), leanEntry()] },
  app: {
    head: {
      htmlAttrs: { lang: 'en-GB' },
      title: 'Oxmere Spring Works',
      meta: [{ name: 'viewport', content: 'width=device-width, initial-scale=1' }],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/mark.svg' }],
    },
  },

  auth: {
    baseURL: '/api/auth',
    provider: {
      type: 'local',
      endpoints: {
        signIn: { path: '/login', method: 'post' },
        signOut: { path: '/logout', method: 'post' },
        signUp: false,
        getSession: { path: '/session', method: 'get' },
      },
      pages: { login: '/sign-in' },
      token: {
        signInResponseTokenPointer: '/token',
        cookieName: 'auth.token',
        maxAgeInSeconds: 30 * dayS,
        sameSiteAttribute: 'lax',
        secureCookieAttribute: true,
        httpOnlyCookieAttribute: false,
      },
      session: {
        dataType: { id: 'string', name: 'string', email: 'string', roles: "('customer' | 'estimator' | 'supervisor' | 'operator' | 'bookkeeper' | 'admin')[]", companyName: 'string | null' },
        dataResponsePointer: '/user',
      },
    },
    sessionRefresh: { enableOnWindowFocus: false, enablePeriodically: false },
    // app/middleware/signed-in.global.ts does this.
    globalAppMiddleware: { isEnabled: false, allow404WithoutAuth: false },
  },

  routeRules: {
    // The form holds nothing personal, so it is rendered once and kept. The front page cannot be: this Nuxt keeps a kept page's
    // payload under its path, and '/' is no valid key of its storage.
    '/order': { cache: { maxAge: 3600, swr: true } },
  },

  nitro,

  runtimeConfig: {
    databaseUrl: '',
    mode: 'production',
    origin: '',
    trustedProxies: '',
    limits: 'on',
    shopTimeZone: 'Europe/Dublin',
    // Pages show the shop's times in the shop's zone; set NUXT_PUBLIC_SHOP_TIME_ZONE with NUXT_SHOP_TIME_ZONE.
    public: { shopTimeZone: 'Europe/Dublin' },
    stripe: { secretKey: '', webhookSecrets: '', host: '', port: '', protocol: 'https', livemode: 'false' },
    smtp: { host: '', port: '587', secure: 'false', user: '', password: '' },
    mail: { from: 'Oxmere Spring Works <orders@oxmere.invalid>', replyTo: '' },
  },
})
