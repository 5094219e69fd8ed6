import { chmodSync, cpSync, mkdtempSync, readdirSync, rmSync, symlinkSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join, resolve } from 'node:path'

const OWN = new Set(['scripts', '.data', '.git', 'test-results'])

/**
 * A folder that is this project to `npm start`, but with a data folder of its own: the scripts are copied (they find the
 * project by where they lie), everything else is linked, the build included.
 */
export function makeCopyOfProject(): { folder: string, remove: () => void } {
  const project = resolve(import.meta.dirname, '../../..')
  const folder = mkdtempSync(join(tmpdir(), 'wirewright-start-'))
  chmodSync(folder, 0o711)
  cpSync(join(project, 'scripts'), join(folder, 'scripts'), { recursive: true })
  for (const name of readdirSync(project)) if (!OWN.has(name)) symlinkSync(join(project, name), join(folder, name))
  return { folder, remove: () => rmSync(folder, { recursive: true, force: true }) }
}
