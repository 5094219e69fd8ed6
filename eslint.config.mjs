import { createConfigForNuxt } from '@nuxt/eslint-config/flat'

/**
 * The rooms of the house and the doors between them: an import that goes against the arrow is an error.
 * `#server` and `#shared` are aliases; relative paths are matched by the name of the room.
 */
const FRAMEWORKS = ['vue', 'vue-router', 'pinia', 'nuxt', '\\#imports', '\\#app', 'h3', 'nitropack', 'nitropack/*', 'drizzle-orm', 'drizzle-orm/*', 'pg', 'stripe', 'nodemailer']

/**
 * @param {string} why
 * @param {string[]} patterns in the manner of .gitignore, where a bare # would begin a comment
 * @returns {{ 'no-restricted-imports': ['error', object] }}
 */
function forbidImports(why, patterns) {
  return { 'no-restricted-imports': ['error', { patterns: [{ group: patterns, message: why }] }] }
}

export default createConfigForNuxt({
  features: { standalone: true, stylistic: false, tooling: false },
  dirs: { root: ['.'], src: ['app'], pages: ['app/pages'], layouts: ['app/layouts'], components: ['app/components'], composables: ['app/composables'], plugins: ['app/plugins'], middleware: ['app/middleware'] },
})
  .prepend({ ignores: ['.nuxt/**', '.output/**', '.data/**', 'coverage/**', 'test-results/**', 'playwright-report/**', 'drizzle/**', 'public/**', 'tests/e2e/screenshots/**'] })
  .append({
    name: 'wirewright/types',
    files: ['**/*.ts', '**/*.vue'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': 'error',
      '@typescript-eslint/ban-ts-comment': 'error',
      // Matters of taste that no defect has ever come from.
      '@typescript-eslint/consistent-type-imports': 'off',
      '@typescript-eslint/no-dynamic-delete': 'off',
      'import/no-duplicates': 'off',
      // Control characters in a pattern are there to be refused.
      'no-control-regex': 'off',
      'vue/require-default-prop': 'off',
      // Vitest's ProvidedContext can only be extended as an interface.
      '@typescript-eslint/no-empty-object-type': ['error', { allowInterfaces: 'with-single-extends' }],
    },
  })
  .append({
    name: 'wirewright/scripts',
    files: ['**/*.mjs'],
    rules: { 'no-unused-vars': 'off', '@typescript-eslint/no-unused-vars': 'error' },
  })
  .append({
    name: 'wirewright/browser-tests',
    files: ['tests/e2e/**/*.ts'],
    // Playwright reads which fixtures a function wants from its first pattern, and takes nothing but a pattern.
    rules: { 'no-empty-pattern': ['error', { allowObjectPatternsAsParameters: true }] },
  })
  .append({
    name: 'wirewright/shared-knows-neither-side',
    files: ['shared/**/*.ts'],
    rules: forbidImports('Shared code runs on both sides: it imports neither server nor app, nor a framework.', ['**/server/**', '\\#server/**', '**/app/**', '~/**', ...FRAMEWORKS]),
  })
  .append({
    name: 'wirewright/spring-is-pure',
    files: ['shared/spring/**/*.ts'],
    rules: {
      ...forbidImports('The mechanics are plain functions of numbers: no framework, no schema, no file, no clock.', ['**/server/**', '\\#server/**', '**/app/**', '~/**', '**/schemas/**', '\\#shared/schemas/**', 'zod', 'node:*', ...FRAMEWORKS]),
      'no-restricted-globals': ['error', 'fetch', 'process', 'console', 'window', 'document'],
      'no-restricted-properties': ['error', { object: 'Date', property: 'now' }, { object: 'Math', property: 'random' }],
    },
  })
  .append({
    name: 'wirewright/engine-is-pure',
    files: ['server/engine/**/*.ts'],
    rules: {
      ...forbidImports('The engine takes plain values and returns plain values: no database, no service, no route, no framework.', ['**/database/**', '\\#server/database/**', '**/services/**', '\\#server/services/**', '**/integrations/**', '\\#server/integrations/**', '**/api/**', '**/server/utils/**', '\\#server/utils/**', '**/app/**', '~/**', 'node:*', ...FRAMEWORKS]),
      'no-restricted-globals': ['error', 'fetch', 'process', 'console'],
      'no-restricted-properties': ['error', { object: 'Date', property: 'now' }, { object: 'Math', property: 'random' }],
    },
  })
  .append({
    name: 'wirewright/routes-ask-services',
    files: ['server/api/**/*.ts', 'server/routes/**/*.ts'],
    rules: forbidImports('A route parses, asks one service and answers: tables belong to the services.', ['**/database/schema', '**/database/schema/**', '\\#server/database/schema', '\\#server/database/schema/**', 'drizzle-orm', 'drizzle-orm/*', 'pg']),
  })
  .append({
    name: 'wirewright/services-know-no-request',
    files: ['server/services/**/*.ts'],
    rules: forbidImports('A service is called by routes, tasks and tests alike: it sees no request and imports no route.', ['h3', 'nitropack', 'nitropack/*', '\\#imports', '**/api/**', '\\#server/api/**', '**/app/**', '~/**', 'vue']),
  })
  .append({
    name: 'wirewright/tables-import-nothing-above',
    files: ['server/database/schema/**/*.ts'],
    rules: forbidImports('The tables stand below everything but the types of plain values.', ['**/services/**', '\\#server/services/**', '**/api/**', '**/integrations/**', '\\#server/integrations/**', '**/app/**', '~/**']),
  })
  .append({
    name: 'wirewright/app-asks-by-http',
    files: ['app/**/*.ts', 'app/**/*.vue'],
    rules: forbidImports('The browser side reaches the server through its routes only.', ['**/server/**', '\\#server/**', 'drizzle-orm', 'drizzle-orm/*', 'pg', 'stripe', 'nodemailer', 'node:*']),
  })
  .append({
    name: 'wirewright/start-up-needs-no-package',
    files: ['scripts/**/*.mjs'],
    ignores: ['scripts/mail-inbox.mjs'],
    rules: {
      'no-restricted-imports': ['error', { patterns: [{ regex: '^(?!node:|[.]{1,2}/)', message: 'The scripts run before the packages are installed: Node.js built-ins and each other only.' }] }],
    },
  })
