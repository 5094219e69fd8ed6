import { fileURLToPath } from 'node:url'
import type { Plugin } from 'vite'

const PARTS: Readonly<Record<string, string>> = {
  '@formkit/inputs': '../formkit/inputs.ts', '@formkit/i18n': '../formkit/messages.ts', '@formkit/rules': '../formkit/rules.ts', '@formkit/themes': '../formkit/themes.ts', '@formkit/dev': '../formkit/dev.ts',
}

/**
 * FormKit's Vue package pulls in every input, rule, theme and message it has, 9 kB gzip on the first page a customer sees.
 * We bring our own controls, so only what a form needs is put in their place.
 */
export function slimFormKit(): Plugin {
  return {
    name: 'wirewright:slim-formkit',
    enforce: 'pre',
    resolveId(source, importer) {
      const part = PARTS[source]
      return part && importer?.includes('/@formkit/vue/dist/') ? fileURLToPath(new URL(part, import.meta.url)) : null
    },
  }
}
