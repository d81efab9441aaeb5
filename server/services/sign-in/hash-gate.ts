import { AppError } from '../../errors.ts'

interface Limits {
  /** Runs at the same time. */
  readonly atOnce: number
  /** Waits at most; one more is refused at once. */
  readonly longestQueue: number
  readonly longestWaitMs: number
}

interface Waiting {
  readonly enter: () => void
}

/**
 * Lets a few password hashes run at a time, so that sign-ins leave a core to everything else. Beyond the queue or the
 * wait the answer is `unavailable` with `Retry-After`.
 */
export class HashGate {
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
    if (this.#queue.length >= longestQueue) throw tooBusy()
    return new Promise((resolve, reject) => {
      const waiting: Waiting = {
        enter: () => {
          clearTimeout(timer)
          resolve()
        },
      }
      const timer = setTimeout(() => {
        this.#queue.splice(this.#queue.indexOf(waiting), 1)
        reject(tooBusy())
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

function tooBusy(): AppError {
  return new AppError('unavailable', 'Many are signing in just now. Try again in a moment.', {
    retryAfterSeconds: 3,
  })
}
