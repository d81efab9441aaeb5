import { AppError } from '../errors.ts'

interface Limits {
  /** Runs at the same time. */
  readonly atOnce: number
  /** Waits at most; one more is refused at once. */
  readonly longestQueue: number
  readonly longestWaitMs: number
  /** What is said to those who do not get in. */
  readonly busy: string
}

interface Waiting {
  readonly enter: () => void
}

/**
 * Lets a few pieces of heavy work (password hashes, pictures) run at a time, so that they leave a core to everything
 * else. Beyond the queue or the wait the answer is `unavailable` with `Retry-After`.
 */
export class WorkGate {
  #running = 0
  readonly #queue: Waiting[] = []

  constructor(private readonly limits: Limits) {}

  async run<T>(work: () => Promise<T>): Promise<T> {
    if (this.#running >= this.limits.atOnce) await this.#wait()
    else this.#running += 1
    try {
      return await work()
    } finally {
      this.#leave()
    }
  }

  #wait(): Promise<void> {
    const { longestQueue, longestWaitMs } = this.limits
    if (this.#queue.length >= longestQueue) throw tooBusy(this.limits.busy)
    return new Promise((resolve, reject) => {
      const waiting: Waiting = {
        enter: () => {
          clearTimeout(timer)
          resolve()
        },
      }
      const timer = setTimeout(() => {
        this.#queue.splice(this.#queue.indexOf(waiting), 1)
        reject(tooBusy(this.limits.busy))
      }, longestWaitMs)
      this.#queue.push(waiting)
    })
  }

  /** Hands the place on to the first in the queue, else gives it up. */
  #leave(): void {
    const next = this.#queue.shift()
    if (next) next.enter()
    else this.#running -= 1
  }
}

function tooBusy(detail: string): AppError {
  return new AppError('unavailable', detail, { retryAfterSeconds: 3 })
}
