import { ESLint } from 'eslint'
import { describe, expect, it } from 'vitest'

const eslint = new ESLint()
const messagesFor = async (filePath: string, code: string): Promise<string[]> => {
  const [result] = await eslint.lintText(code, { filePath })
  return (result?.messages ?? []).map(({ ruleId }) => ruleId ?? 'cannot be parsed')
}

describe('an import against the arrows of the house is an error', () => {
  it.each([
    ['shared/spring/rate.ts', 'zod'],
    ['shared/spring/rate.ts', 'vue'],
    ['shared/spring/deep/rate.ts', 'drizzle-orm/pg-core'],
    ['shared/spring/rate.ts', '../schemas/quote'],
    ['shared/spring/rate.ts', 'node:fs'],
    ['shared/schemas/quote.ts', '../../server/engine/pricing/types'],
    ['shared/schemas/quote.ts', '#server/engine/pricing/types'],
    ['shared/schemas/quote.ts', '~/composables/useUnits'],
    ['server/engine/pricing/price.ts', '../../database/schema'],
    ['server/engine/pricing/price.ts', '../../services/quotes/send'],
    ['server/engine/pricing/price.ts', 'h3'],
    ['server/api/quotes/[id].get.ts', '../../database/schema'],
    ['server/api/quotes/[id].get.ts', '#server/database/schema/orders'],
    ['server/api/quotes/[id].get.ts', 'drizzle-orm'],
    ['server/services/quotes/send.ts', 'h3'],
    ['server/services/quotes/send.ts', '../../api/quotes/index.get'],
    ['server/database/schema/orders.ts', '../../services/quotes/send'],
    ['app/composables/useUnits.ts', '../../server/engine/pricing/price'],
    ['app/components/quote/Price.vue', '#server/services/quotes/send'],
    ['scripts/lib/ports.mjs', 'pg'],
  ])('%s may not import %s', async (filePath, source) => {
    const code = `import { thing } from '${source}'\nexport const other = thing\n`
    expect(await messagesFor(filePath, filePath.endsWith('.vue') ? `<script setup lang="ts">\n${code.replace('export ', '')}</script>\n<template><p>{{ other }}</p></template>\n` : code)).toContain('no-restricted-imports')
  })

  it.each([
    ['shared/spring/rate.ts', '../units/length'],
    ['shared/schemas/quote.ts', 'zod'],
    ['server/engine/pricing/price.ts', 'decimal.js'],
    ['server/engine/pricing/price.ts', '#shared/spring/rate'],
    ['server/api/quotes/[id].get.ts', '../../services/quotes/get'],
    ['server/services/quotes/send.ts', '../../database/schema'],
    ['app/composables/useUnits.ts', '#shared/units/length'],
    ['scripts/lib/ports.mjs', './say.mjs'],
  ])('%s may import %s', async (filePath, source) => {
    expect(await messagesFor(filePath, `import { thing } from '${source}'\nexport const other = thing\n`)).toEqual([])
  })

  it('the mechanics may not read the clock or a random number', async () => {
    expect(await messagesFor('shared/spring/rate.ts', 'export const a = Date.now() + Math.random()\n')).toEqual(['no-restricted-properties', 'no-restricted-properties'])
  })
})

it('an any and an unused variable are errors', async () => {
  expect(await messagesFor('server/utils/log.ts', 'export const a: any = 1\nconst unused = 2\n')).toEqual(['@typescript-eslint/no-explicit-any', '@typescript-eslint/no-unused-vars'])
})
