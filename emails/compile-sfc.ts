import { readFile } from 'node:fs/promises'
import ts from 'typescript'
import { compileScript, parse } from 'vue/compiler-sfc'

type SfcPlugin = { name: string, enforce: 'pre', load: (id: string) => Promise<{ code: string, map: null } | null> }

/**
 * Compiles the e-mails' single-file components for the server, in Rollup (Nitro) and in Vite (tests) alike. Only script setup with
 * TypeScript and a template; no styles, which a mail has none of. (unplugin-vue 7.2 needs a newer Vite for TypeScript than Nuxt 4.4 has.)
 */
export function compileMailComponents(): SfcPlugin {
  return {
    name: 'mail-components',
    enforce: 'pre',
    async load(id) {
      if (!/[\\/]emails[\\/].*\.vue$/.test(id)) return null
      const { descriptor, errors } = parse(await readFile(id, 'utf8'), { filename: id })
      if (errors.length > 0) throw errors[0]
      const { content } = compileScript(descriptor, { id, inlineTemplate: true, isProd: true, templateOptions: { ssr: true, ssrCssVars: [], isProd: true } })
      const { outputText } = ts.transpileModule(content, { compilerOptions: { target: ts.ScriptTarget.ESNext, module: ts.ModuleKind.ESNext, verbatimModuleSyntax: true } })
      return { code: outputText, map: null }
    },
  }
}
