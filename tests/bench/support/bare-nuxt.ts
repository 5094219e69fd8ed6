import { spawn, spawnSync } from 'node:child_process'
import { once } from 'node:events'
import { mkdir, mkdtemp, rm, symlink, writeFile } from 'node:fs/promises'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'

const MODULES = fileURLToPath(new URL('../../../node_modules', import.meta.url))

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1')
  await once(server, 'listening')
  const address = server.address()
  server.close()
  return typeof address === 'object' && address ? address.port : 0
}

/** Builds a Nuxt application of one page with one sentence, from the same packages, and serves it: what everything is compared with. */
export async function startBareNuxt(): Promise<{ url: string, stop: () => Promise<void> }> {
  const folder = await mkdtemp(join(tmpdir(), 'bare-nuxt-'))
  await mkdir(join(folder, 'app'))
  await symlink(MODULES, join(folder, 'node_modules'))
  await writeFile(join(folder, 'package.json'), '{ "type": "module" }')
  await writeFile(join(folder, 'nuxt.config.ts'), `export default defineNuxtConfig({ compatibilityDate: '2026-05-01', telemetry: false, devtools: { enabled: false } })`)
  await writeFile(join(folder, 'app/app.vue'), '<template><main><h1>Bare</h1><p>One sentence.</p></main></template>')
  const build = spawnSync(process.execPath, [join(MODULES, 'nuxt/bin/nuxt.mjs'), 'build'], { cwd: folder, env: { ...process.env, NUXT_TELEMETRY_DISABLED: '1' }, encoding: 'utf8' })
  if (build.status !== 0) throw new Error(`The bare application was not built: ${build.stderr.slice(-800)}`)
  const port = await freePort()
  const server = spawn(process.execPath, ['.output/server/index.mjs'], { cwd: folder, env: { ...process.env, NITRO_HOST: '127.0.0.1', NITRO_PORT: String(port) }, stdio: 'ignore' })
  const url = `http://127.0.0.1:${port}`
  for (let tries = 0; tries < 100; tries += 1) {
    if (await fetch(url).then(answer => answer.ok, () => false)) break
    await new Promise(resolve => setTimeout(resolve, 100))
  }
  return {
    url,
    stop: async () => {
      server.kill('SIGTERM')
      await once(server, 'exit')
      await rm(folder, { recursive: true, force: true })
    },
  }
}
