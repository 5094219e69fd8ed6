import { readdirSync } from 'node:fs'
import { join, relative } from 'node:path'

export type ApiRoute = { method: string, path: string }

/** The routes of the file tree under `server/api`: `{ method: 'GET', path: '/api/orders/:ref' }`. */
export function listApiRoutes(root: string): ApiRoute[] {
  return readdirSync(root, { recursive: true, withFileTypes: true }).flatMap((entry) => {
    const file = relative(root, join(entry.parentPath, entry.name))
    const [, path, method] = /^(.*)\.(get|post|put|patch|delete)\.ts$/.exec(file) ?? []
    if (path === undefined || method === undefined) return []
    return [{ method: method.toUpperCase(), path: `/api/${path.replace(/(^|\/)index$/, '').replace(/\[([^\]]+)\]/g, ':$1')}`.replace(/\/$/, '') }]
  }).sort((a, b) => a.path.localeCompare(b.path) || a.method.localeCompare(b.method))
}
