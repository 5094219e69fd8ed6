import { createHash } from 'node:crypto'
import { existsSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs'
import { join, relative } from 'node:path'
import { buildBuildEnv } from './app-env.mjs'
import { findLockHolder, takeLock } from './lock-file.mjs'
import { DATA_FOLDER, PROJECT_FOLDER, START_LOCK, projectPath } from './project.mjs'
import { runLogged } from './run.mjs'
import { PlainError } from './say.mjs'

const SOURCE_FOLDERS = ['app', 'server', 'shared', 'emails', 'drizzle', 'public', 'formkit', 'vite']
const SOURCE_FILES = ['nuxt.config.ts', 'formkit.config.ts', 'formkit.theme.ts', 'tailwind.config.ts', 'tailwind.config.js', 'tsconfig.json', 'package.json', 'package-lock.json']
export const APP_ENTRY = projectPath('.output', 'server', 'index.mjs')
// Inside the output: whoever deletes or replaces the build takes its stamp along.
const STAMP = projectPath('.output', 'wirewright-sources')

/**
 * Builds the app if its sources differ from those of the build that is there.
 * @param {object} options
 * @param {string} options.logFile
 * @param {AbortSignal} [options.signal]
 * @param {(text: string) => void} options.report
 */
export async function ensureBuilt({ logFile, signal, report }) {
  const sources = hashSources(PROJECT_FOLDER)
  if (isBuildOf(sources)) return
  const release = await takeBuildLock(report)
  try {
    if (isBuildOf(sources)) return
    assertNobodyServesTheBuild()
    report('Building the app (about half a minute) ...')
    await runLogged('The build', process.execPath, [projectPath('node_modules', 'nuxt', 'bin', 'nuxt.mjs'), 'build'], {
      cwd: PROJECT_FOLDER,
      env: buildBuildEnv(),
      logFile,
      signal,
    })
    writeFileSync(STAMP, sources)
  } finally {
    release()
  }
}

/** @param {string} sources */
function isBuildOf(sources) {
  return existsSync(APP_ENTRY) && existsSync(STAMP) && readFileSync(STAMP, 'utf8') === sources
}

/** @param {(text: string) => void} report */
async function takeBuildLock(report) {
  const path = join(DATA_FOLDER, 'build.lock')
  let hasSaidSo = false
  for (;;) {
    const lock = takeLock(path, 'build')
    if (lock.taken) return lock.release
    if (!hasSaidSo) report('Another program builds the app at the moment: waiting for it.')
    hasSaidSo = true
    await new Promise((resolve) => setTimeout(resolve, 500))
  }
}

/** A running shop reads files of its build as they are asked for: replacing them under it would break it. */
function assertNobodyServesTheBuild() {
  const holder = findLockHolder(START_LOCK)
  if (holder && holder.pid !== process.pid) {
    throw new PlainError(`The sources changed since the last build, and npm start (process ${holder.pid}) serves that build. Stop it first, then run this again.`)
  }
}

/**
 * One number for everything the build is made from: a change of any name or byte changes it, and so does another Node.js.
 * @param {string} projectFolder
 */
export function hashSources(projectFolder) {
  const hash = createHash('sha256').update(process.versions.node)
  const files = [...SOURCE_FILES.map((name) => join(projectFolder, name)), ...SOURCE_FOLDERS.flatMap((name) => listFiles(join(projectFolder, name)))]
  for (const file of files) {
    if (!existsSync(file)) continue
    const content = readFileSync(file)
    hash.update(`\0${relative(projectFolder, file)}\0${content.length}\0`).update(content)
  }
  return hash.digest('hex')
}

/**
 * @param {string} folder
 * @returns {string[]}
 */
function listFiles(folder) {
  if (!existsSync(folder) || !statSync(folder).isDirectory()) return []
  return readdirSync(folder, { withFileTypes: true })
    .sort((a, b) => (a.name < b.name ? -1 : 1))
    .flatMap((entry) => (entry.isDirectory() ? listFiles(join(folder, entry.name)) : [join(folder, entry.name)]))
}
