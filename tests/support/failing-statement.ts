import pg from 'pg'
import type { TestApp } from './test-app.ts'

interface Injection {
  /** What failed; undefined while nothing has. */
  readonly failed: string | undefined
  stop(): void
}

const FRAME = /^(BEGIN|COMMIT|ROLLBACK|SELECT set_config)/

/**
 * Lets the nth statement from now on fail as a full disk would (53100). Counts what this process sends to the app's own
 * database, without the statements that begin and end transactions.
 */
export function failStatement(app: TestApp, nth: number): Injection {
  const original = pg.Client.prototype.query
  const database = decodeURIComponent(new URL(app.ctx.config.databaseUrl).pathname.slice(1))
  let seen = 0
  let failed: string | undefined
  const query = function (this: pg.Client, ...args: unknown[]): unknown {
    const text = typeof args[0] === 'string' ? args[0] : ((args[0] as { text?: string })?.text ?? '')
    const counts = this.database === database && !FRAME.test(text.trim())
    if (counts) seen += 1
    if (!counts || failed !== undefined || seen !== nth) return Reflect.apply(original, this, args)
    failed = text
    const error = Object.assign(new Error('could not extend file: No space left on device'), {
      code: '53100',
    })
    const callback = args.at(-1)
    if (typeof callback === 'function') return void process.nextTick(callback as () => void, error)
    return Promise.reject(error)
  }
  pg.Client.prototype.query = query as typeof original
  return {
    get failed() {
      return failed
    },
    stop() {
      pg.Client.prototype.query = original
    },
  }
}
