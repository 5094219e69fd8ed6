import { accessSync, constants, existsSync, mkdirSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { isRoot } from './project.mjs'
import { runLogged } from './run.mjs'
import { PlainError, say } from './say.mjs'

const CLUSTER_SETTINGS = '/etc/postgresql-common/createcluster.d/wirewright.conf'
const NO_MAIN_CLUSTER = 'create_main_cluster = false'

export const CHROMIUM = '/usr/bin/chromium'

/**
 * Programs that the tests drive beside PostgreSQL, with the file that shows each is installed.
 * @type {ReadonlyArray<{ name: string, file: string }>}
 */
export const TEST_PACKAGES = [
  { name: 'chromium', file: CHROMIUM },
  { name: 'calculix-ccx', file: '/usr/bin/ccx' },
  { name: 'python3-scipy', file: '/usr/lib/python3/dist-packages/scipy/version.py' },
  { name: 'units', file: '/usr/bin/units' },
  { name: 'poppler-utils', file: '/usr/bin/pdftotext' },
  { name: 'fonts-dejavu-core', file: '/usr/share/fonts/truetype/dejavu/DejaVuSans.ttf' },
]

/**
 * Installs Debian packages as root; otherwise says which command an administrator must run, and stops.
 * @param {string} purpose 'PostgreSQL is not installed on this machine.'
 * @param {readonly string[]} names
 * @param {{ logFile: string, withPostgres?: boolean }} options
 */
export async function installDebianPackages(purpose, names, { logFile, withPostgres = false }) {
  if (!isExecutable('/usr/bin/apt-get')) {
    throw new PlainError(`${purpose} Only Debian's packages can be installed by this program. Install these yourself: ${names.join(', ')}.`)
  }
  if (!isRoot()) throw new PlainError(`${purpose} An administrator must run this once:\n\n  ${administratorCommand(names, withPostgres)}\n`)
  if (withPostgres) forbidMainCluster()
  say(`${purpose} Installing from Debian: ${names.join(', ')} (a minute or two) ...`)
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  // In a group of its own: Ctrl-C must not leave Debian's packages half installed.
  const options = { env, logFile, detached: true }
  await runLogged('apt-get update', '/usr/bin/apt-get', ['-q', 'update'], options)
  await runLogged(
    'apt-get install',
    '/usr/bin/apt-get',
    ['-q', '-y', '-o', 'Dpkg::Options::=--force-confdef', '-o', 'Dpkg::Options::=--force-confold', 'install', '--no-install-recommends', ...names],
    options,
  )
}

/**
 * @param {readonly string[]} names
 * @param {boolean} withPostgres
 */
function administratorCommand(names, withPostgres) {
  const install = `apt-get update && apt-get install -y --no-install-recommends ${names.join(' ')}`
  if (!withPostgres) return install
  return `mkdir -p ${dirname(CLUSTER_SETTINGS)} && echo '${NO_MAIN_CLUSTER}' > ${CLUSTER_SETTINGS} && ${install}`
}

/** Debian's package would make a cluster of its own on port 5432, which nobody here asked for. */
function forbidMainCluster() {
  mkdirSync(dirname(CLUSTER_SETTINGS), { recursive: true })
  writeFileSync(CLUSTER_SETTINGS, `${NO_MAIN_CLUSTER}\n`)
}

/**
 * Installs what the tests drive, as far as it is absent.
 * @param {{ logFile: string }} options
 */
export async function ensureTestPrograms(options) {
  const absent = TEST_PACKAGES.filter(({ file }) => !existsSync(file)).map(({ name }) => name)
  if (absent.length === 0) return
  await installDebianPackages(`The tests need programs that are not installed: ${absent.join(', ')}.`, absent, options)
}

/** @param {string} path */
export function isExecutable(path) {
  try {
    accessSync(path, constants.X_OK)
    return true
  } catch {
    return false
  }
}
