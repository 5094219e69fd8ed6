import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vitest/config'
import { compileMailComponents } from './emails/compile-sfc'

const alias = {
  '#shared': fileURLToPath(new URL('./shared', import.meta.url)),
  '#server': fileURLToPath(new URL('./server', import.meta.url)),
  '~': fileURLToPath(new URL('./app', import.meta.url)),
}

/**
 * unit: pure code, no services. reference: checks against published values and other programs.
 * api: a running server, real PostgreSQL, the Stripe fake and a real SMTP inbox. bench: ratios, not part of `npm test`.
 */
export default defineConfig({
  test: {
    projects: [
      { plugins: [compileMailComponents()], resolve: { alias }, test: { name: 'unit', include: ['tests/unit/**/*.test.ts'], environment: 'node', testTimeout: 30_000 } },
      { resolve: { alias }, test: { name: 'reference', include: ['tests/reference/**/*.test.ts'], environment: 'node', testTimeout: 120_000 } },
      {
        resolve: { alias },
        test: {
          name: 'api',
          include: ['tests/api/**/*.test.ts'],
          environment: 'node',
          globalSetup: ['tests/api/global-setup.ts'],
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 120_000,
        },
      },
      { resolve: { alias }, test: { name: 'bench', include: ['tests/bench/**/*.test.ts'], environment: 'node', testTimeout: 300_000, fileParallelism: false } },
    ],
  },
})
