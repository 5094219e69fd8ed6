import { readFileSync } from 'node:fs'
import { siteUrl } from './app-env.mjs'

/**
 * @typedef {{ role: string, email: string, password: string }} DemoSignIn
 */

/**
 * The demo sign-ins that the seed wrote down.
 * @param {string} path
 * @returns {DemoSignIn[]}
 */
export function readDemoSignIns(path) {
  return JSON.parse(readFileSync(path, 'utf8'))
}

/**
 * What `npm start` prints when all is ready.
 * @param {import('./app-env.mjs').Surroundings} surroundings
 * @param {readonly DemoSignIn[]} signIns
 */
export function buildAnnouncement(surroundings, signIns) {
  const { ports } = surroundings
  const roleWidth = Math.max(4, ...signIns.map(({ role }) => role.length))
  const emailWidth = Math.max(6, ...signIns.map(({ email }) => email.length))
  return [
    '',
    'Wirewright is ready.',
    '',
    `  The shop            ${siteUrl(surroundings)}`,
    `  Mail inbox          http://127.0.0.1:${ports.mailWeb}/index.html`,
    `  Stripe fake         http://127.0.0.1:${ports.stripeFake}`,
    `  PostgreSQL          127.0.0.1:${ports.postgres} (its passwords: .data/secrets.json)`,
    '',
    'Demo sign-ins:',
    '',
    ...signIns.map(({ role, email, password }) => `  ${role.padEnd(roleWidth)}  ${email.padEnd(emailWidth)}  ${password}`),
    '',
    'These sign-ins, the Stripe fake and the mail inbox exist in this demo mode only: no money moves and no e-mail leaves this machine.',
    'Press Ctrl-C to stop everything.',
    '',
  ].join('\n')
}
