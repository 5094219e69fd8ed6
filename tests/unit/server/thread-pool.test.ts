import { afterEach, describe, expect, it } from 'vitest'
import { fileURLToPath } from 'node:url'
import { createThreadPool, ThreadError, type ThreadPool, type ThreadPoolOptions } from '#server/integrations/thread-pool'
import { bundleThread } from '../../../vite/bundle-thread'

/** A thread that waits, fails or dies as the job says, and tells which thread it was. */
const SOURCE = `
const { parentPort, threadId } = require('node:worker_threads')
parentPort.on('message', ({ job }) => {
  if (job.dies) process.exit(3)
  if (job.hoards) for (const all = []; ;) all.push(new Array(10_000).fill(all.length))
  if (job.throws) throw new Error('a fault outside the job')
  setTimeout(() => parentPort.postMessage(job.fails ? { error: 'Error: it cannot be done' } : { answer: { value: job.value, threadId } }), job.ms ?? 0)
})`

type Job = { value?: number, ms?: number, fails?: true, dies?: true, throws?: true, hoards?: true }
type Answer = { value: number, threadId: number }

let pool: ThreadPool<Job, Answer>
const open = (options: Partial<ThreadPoolOptions> = {}) => (pool = createThreadPool<Job, Answer>({ source: SOURCE, threads: 2, mostWaiting: 2, longestMs: 5000, mostMemoryMib: 64, ...options }))
afterEach(() => pool.close())

const reasonOf = (promise: Promise<unknown>) => promise.then(() => 'done', (error: unknown) => (error instanceof ThreadError ? error.reason : 'another error'))

describe('thread pool', () => {
  it('answers each job with its own answer, on no more threads than told', async () => {
    open({ mostWaiting: 50 })
    const answers = await Promise.all(Array.from({ length: 20 }, (_, value) => pool.run({ value, ms: value % 3 })))
    expect(answers.map(({ value }) => value)).toEqual(Array.from({ length: 20 }, (_, value) => value))
    expect(new Set(answers.map(({ threadId }) => threadId)).size).toBe(2)
  })

  it('refuses at once what would wait beyond the queue, and takes more when there is room', async () => {
    open()
    const taken = Array.from({ length: 4 }, (_, value) => pool.run({ value, ms: 50 }))
    expect(await reasonOf(pool.run({ value: 5 }))).toBe('full')
    await Promise.all(taken)
    expect((await pool.run({ value: 6 })).value).toBe(6)
  })

  it.each([['exits', { dies: true }], ['throws outside its job', { throws: true }], ['needs too much memory', { hoards: true }]] as const)('loses only its own job when a thread %s, and starts another', async (_, job) => {
    open({ threads: 1, mostWaiting: 5 })
    const [lost, next] = await Promise.all([reasonOf(pool.run(job)), pool.run({ value: 7 })])
    expect(lost).toBe('crashed')
    expect(next.value).toBe(7)
  })

  it('hands on the words of a job that failed and keeps the thread', async () => {
    open({ threads: 1 })
    const { threadId } = await pool.run({ value: 1 })
    await expect(pool.run({ fails: true })).rejects.toThrow('it cannot be done')
    expect((await pool.run({ value: 2 })).threadId).toBe(threadId)
  })

  it('ends a job that takes too long, and its thread with it', async () => {
    // Long enough for the next job's thread to start on a busy machine.
    open({ threads: 1, longestMs: 1_500 })
    expect(await reasonOf(pool.run({ ms: 60_000 }))).toBe('too-long')
    expect((await pool.run({ value: 3 })).value).toBe(3)
  })

  it('refuses what waits and what runs when it is closed', async () => {
    open({ threads: 1 })
    const reasons = [pool.run({ ms: 60_000 }), pool.run({ value: 1 })].map(reasonOf)
    await pool.close()
    expect(await Promise.all(reasons)).toEqual(['closed', 'closed'])
    expect(await reasonOf(pool.run({ value: 2 }))).toBe('closed')
  })
})

describe('the thread that sizes springs', () => {
  it('is one source that needs nothing beside Node, and answers a request', async () => {
    const source = await bundleThread(fileURLToPath(new URL('../../../server/threads/sizing.ts', import.meta.url)))
    const sizing = createThreadPool<object, { designs: { objectiveValue: number }[], searched: { wires: number } }>({ source, threads: 1, mostWaiting: 1, longestMs: 10_000, mostMemoryMib: 256 })
    const request = { kind: 'compression', points: [{ lengthMm: 40, forceN: 50 }, { lengthMm: 30, forceN: 100 }], objective: 'mass', limit: 1 }
    const wires = [1.6, 1.8, 2].map(d => ({ id: String(d), material: 'EN10270-1-SH', wireDiameterMm: d }))
    const { designs, searched } = await sizing.run({ task: 'size', question: { request, wires, book: null } })
    expect(searched.wires).toBe(3)
    expect(designs[0]?.objectiveValue).toBeGreaterThan(0)
    await expect(sizing.run({ task: 'size', question: null })).rejects.toThrow('TypeError')
    await sizing.close()
  })
})
