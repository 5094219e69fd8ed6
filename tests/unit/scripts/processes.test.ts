import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { identifyProcess, isAlive, waitUntilGone } from '../../../scripts/lib/process-identity.mjs'
import { Processes, stopForgottenProcesses } from '../../../scripts/lib/processes.mjs'

const SLEEPS = 'setInterval(() => {}, 1000)'
const IGNORES_TERM = `process.on('SIGTERM', () => {}); console.log('deaf'); ${SLEEPS}`
const HAS_CHILD = `const { pid } = require('node:child_process').spawn(process.execPath, ['-e', ${JSON.stringify(SLEEPS)}]); console.log(pid); ${SLEEPS}`

describe('processes started together', () => {
  let folder = ''
  let recordFile = ''
  let deaths: string[] = []
  let processes: Processes
  const start = (name: string, program: string, stopTimeoutMs?: number) =>
    processes.start({ name, command: process.execPath, args: ['-e', program], env: { PATH: process.env.PATH }, logFile: join(folder, `${name}.log`), stopTimeoutMs })
  const waitForOutput = async (name: string): Promise<string> => {
    for (;;) {
      const text = readFileSync(join(folder, `${name}.log`), 'utf8').trim()
      if (text) return text
      await new Promise(resolve => setTimeout(resolve, 20))
    }
  }

  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'wirewright-processes-'))
    recordFile = join(folder, 'processes.json')
    deaths = []
    processes = new Processes({ recordFile, onUnexpectedExit: (name, how) => deaths.push(`${name}: ${how}`) })
  })
  afterEach(async () => {
    await processes.stopAll()
    rmSync(folder, { recursive: true })
  })

  it('stop without being reported as deaths, and start no more afterwards', async () => {
    const first = start('first', SLEEPS)
    const second = start('second', SLEEPS)
    await processes.stopAll()
    expect([isAlive(first.pid), isAlive(second.pid), deaths]).toEqual([false, false, []])
    expect(() => start('third', SLEEPS)).toThrow(/third is not started/)
  })

  it('take their own children with them', async () => {
    start('parent', HAS_CHILD)
    const childPid = Number(await waitForOutput('parent'))
    expect(isAlive(childPid)).toBe(true)
    await processes.stopAll()
    expect(await waitUntilGone(childPid, 2_000)).toBe(true)
  })

  it('are killed when they do not listen', async () => {
    const deaf = start('deaf', IGNORES_TERM, 200)
    await waitForOutput('deaf')
    await deaf.stop()
    expect(isAlive(deaf.pid)).toBe(false)
  })

  it('report a death nobody asked for, with how it came', async () => {
    const doomed = start('doomed', 'setTimeout(() => process.exit(3), 50)')
    expect(await waitUntilGone(doomed.pid, 5_000)).toBe(true)
    await expect.poll(() => deaths).toEqual(['doomed: exit code 3'])
  })

  it('report a program that is not there', async () => {
    processes.start({ name: 'absent', command: join(folder, 'no-such-program'), args: [], env: {}, logFile: join(folder, 'absent.log') })
    await expect.poll(() => deaths.join()).toMatch(/absent: .*ENOENT/)
  })

  it('are found and ended by the next start after their launcher was killed', async () => {
    const left = start('left', SLEEPS)
    const asAfterKill = join(folder, 'copy.json')
    writeFileSync(asAfterKill, readFileSync(recordFile))
    await stopForgottenProcesses(asAfterKill)
    expect(isAlive(left.pid)).toBe(false)
  })

  it('leave a stranger alone who has got the number of one of them', async () => {
    const stranger = start('stranger', SLEEPS)
    writeFileSync(join(folder, 'old.json'), JSON.stringify([{ name: 'gone', stopSignal: 'SIGTERM', ...identifyProcess(stranger.pid), startedAtTicks: '1' }]))
    await stopForgottenProcesses(join(folder, 'old.json'))
    expect(isAlive(stranger.pid)).toBe(true)
  })
})
