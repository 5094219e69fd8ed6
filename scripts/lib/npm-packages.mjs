import { existsSync, readFileSync } from 'node:fs'
import { PROJECT_FOLDER, projectPath } from './project.mjs'
import { runLogged } from './run.mjs'
import { say } from './say.mjs'

/**
 * @typedef {{ version?: string, optional?: boolean, devOptional?: boolean, peer?: boolean, extraneous?: boolean }} LockedPackage
 */

/**
 * Installs the npm packages of the lock file, if what lies in node_modules is not them.
 * @param {{ logFile: string, signal?: AbortSignal }} options
 */
export async function ensureNpmPackages(options) {
  if (areLockedPackagesInstalled()) return
  say('Installing the npm packages of the lock file (one to three minutes) ...')
  const npm = process.env.npm_execpath
  const [command, args] = npm && /\.c?js$/.test(npm) ? [process.execPath, [npm]] : ['npm', []]
  await runLogged('npm ci', command, [...args, 'ci', '--no-audit', '--no-fund'], { ...options, cwd: PROJECT_FOLDER, env: process.env })
}

/** Whether npm's own record of node_modules agrees with the lock file. npm writes that record last, so it also shows a broken-off install. */
export function areLockedPackagesInstalled() {
  const record = projectPath('node_modules', '.package-lock.json')
  if (!existsSync(record)) return false
  return isRecordComplete(readPackages(projectPath('package-lock.json')), readPackages(record))
}

/**
 * @param {Record<string, LockedPackage>} locked
 * @param {Record<string, LockedPackage>} installed
 */
export function isRecordComplete(locked, installed) {
  return Object.entries(locked).every(([path, { version, optional, devOptional, peer, extraneous }]) => {
    // Extraneous: left over in the lock file from an earlier state, and not installed from it.
    if (path === '' || extraneous) return true
    const found = installed[path]
    // Optional packages are for other machines, most of them.
    if (!found) return Boolean(optional || devOptional || peer)
    return found.version === version
  })
}

/**
 * @param {string} path
 * @returns {Record<string, LockedPackage>}
 */
function readPackages(path) {
  return JSON.parse(readFileSync(path, 'utf8')).packages ?? {}
}
