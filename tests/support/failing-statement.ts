import pg from 'pg'

interface Injection {
  /** Statements that were sent while it was in place, without the transaction's own. */
  readonly seen: number
  readonly failed: boolean
  stop(): void
}

const FRAME = /^(BEGIN|COMMIT|ROLLBACK|SELECT set_config)/

/**
 * Lets the nth statement from now on fail as a full disk would (53100), in this process only. Statements that begin
 * and end transactions do not count.
 */
export function failStatement(nth: number): Injection {
  const original = pg.Client.prototype.query
  const state = { seen: 0, failed: false }
  const query = function (this: pg.Client, ...args: unknown[]): unknown {
    const text = typeof args[0] === 'string' ? args[0] : ((args[0] as { text?: string })?.text ?? '')
    if (FRAME.test(text.trim())) return Reflect.apply(original, this, args)
    state.seen += 1
    if (state.seen !== nth) return Reflect.apply(original, this, args)
    state.failed = true
    const error = Object.assign(new Error('could not extend file: No space left on device'), {
      code: '53100',
    })
    const callback = args.at(-1)
    if (typeof callback === 'function') return void process.nextTick(callback as () => void, error)
    return Promise.reject(error)
  }
  pg.Client.prototype.query = query as typeof original
  return {
    get seen() {
      return state.seen
    },
    get failed() {
      return state.failed
    },
    stop() {
      pg.Client.prototype.query = original
    },
  }
}
