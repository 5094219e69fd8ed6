/** A loop that takes due work from PostgreSQL: woken by whoever writes work, and looking by itself all the same. */
export type Worker = {
  /** Looks now. What another process wrote is found at the next turn of the clock. */
  wake(): void
  start(): void
  /** Takes nothing new, and resolves once what is in hand is finished. */
  stop(): Promise<void>
}

export type WorkerOptions = {
  name: string
  everyMs: number
  /** Takes what is due and does it; returns how much that was. Called again at once until it is nought. */
  takeWork: (isStopping: () => boolean) => Promise<number>
}

/** Makes a worker that is still at rest. */
export function createWorker({ name, everyMs, takeWork }: WorkerOptions): Worker {
  let running: Promise<void> | undefined
  let timer: NodeJS.Timeout | undefined
  let isWoken = false
  let isStopping = false
  let isStarted = false

  async function turn(): Promise<void> {
    try {
      do isWoken = false
      while (!isStopping && (await takeWork(() => isStopping) > 0 || isWoken))
    }
    catch (error) {
      // The database being away is the usual cause; the next turn tries again.
      log.error('worker', error, { worker: name })
    }
    running = undefined
    schedule()
  }
  function schedule(): void {
    clearTimeout(timer)
    if (!isStopping) timer = setTimeout(run, everyMs)
  }
  function run(): void {
    clearTimeout(timer)
    running ??= turn()
  }
  return {
    wake() {
      isWoken = true
      if (isStarted && !isStopping) run()
    },
    start() {
      isStarted = true
      run()
    },
    async stop() {
      isStopping = true
      clearTimeout(timer)
      await running
    },
  }
}
