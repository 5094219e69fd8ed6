import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath, pathToFileURL } from 'node:url'
import { build } from 'esbuild'

type Spring = typeof import('#shared/spring')

/** The calculation in one file, as the server carries it: a test runner's own way of loading modules more than doubles each call's time. */
export async function bundleSpring(): Promise<Spring> {
  const folder = await mkdtemp(join(tmpdir(), 'spring-'))
  const outfile = join(folder, 'spring.mjs')
  await build({ entryPoints: [fileURLToPath(new URL('../../../shared/spring/index.ts', import.meta.url))], bundle: true, outfile, platform: 'node', format: 'esm', target: 'node20', logLevel: 'silent' })
  const spring = await import(pathToFileURL(outfile).href) as Spring
  await rm(folder, { recursive: true, force: true })
  return spring
}
