import { fileURLToPath } from 'node:url'
import { build } from 'esbuild'

const SHARED = fileURLToPath(new URL('../shared', import.meta.url))

/**
 * A thread of the server as one piece of CommonJS source with everything it imports, for `new Worker(source, { eval: true })`:
 * so it needs no file of its own in the built server and shares no module, and no state, with it.
 */
export async function bundleThread(entry: string): Promise<string> {
  const { outputFiles: [file] } = await build({
    entryPoints: [entry], bundle: true, write: false, platform: 'node', format: 'cjs', target: 'node20', minifySyntax: true, legalComments: 'none', logLevel: 'silent', alias: { '#shared': SHARED },
  })
  if (!file) throw new Error(`Nothing was made of the thread ${entry}`)
  return file.text
}
