import { createHash } from 'node:crypto'
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible'
import type { AppContext } from '../../context.ts'
import { AppError } from '../../errors.ts'
import { poolOf } from '../../pool.ts'
import { networkOf } from './network-of.ts'

const WINDOW_SECONDS = 15 * 60
const DAY_SECONDS = 86_400

/** Wrong passwords in a window: for one account from one address, from one address, for one account. */
const LIMITS = { pair: 10, address: 40, account: 40 }

/** An address that an account signed in from is not shut out by what happens elsewhere, for this long. */
const KNOWN_SECONDS = 90 * DAY_SECONDS

/** One try at a password; it counts as wrong until it is taken back. */
export interface Attempt {
  /** The password was never judged: the try does not count. */
  takeBack(): Promise<void>
  /** The password was right: what went wrong before from this address is forgotten. */
  succeed(): Promise<void>
}

/**
 * Counts wrong passwords (promise P18). Counts live in PostgreSQL, so that neither a restart nor a second server
 * resets them; a window ends 15 min after its first try, so that nobody is shut out for longer. Tries are counted
 * before they are judged: many at once do not slip through.
 */
export class PasswordThrottle {
  readonly #pair: RateLimiterPostgres
  readonly #address: RateLimiterPostgres
  readonly #account: RateLimiterPostgres
  readonly #known: RateLimiterPostgres

  constructor(ctx: AppContext) {
    this.#pair = limiter(ctx, 'pair', LIMITS.pair)
    this.#address = limiter(ctx, 'address', LIMITS.address)
    this.#account = limiter(ctx, 'account', LIMITS.account)
    this.#known = limiter(ctx, 'known', 1, KNOWN_SECONDS)
  }

  /** @throws AppError `too-many-tries` with `Retry-After`. */
  async admit(account: string, address: string): Promise<Attempt> {
    const keys = keysOf(account, address)
    const counted: (() => Promise<unknown>)[] = []
    const takeBack = async () => {
      for (const undo of counted) await undo()
    }
    try {
      await count(this.#pair, keys.pair, counted)
      await count(this.#address, keys.address, counted)
      if (!(await this.#known.get(keys.pair))) await count(this.#account, keys.account, counted)
    } catch (error) {
      await takeBack()
      throw error
    }
    return {
      takeBack,
      succeed: async () => {
        await takeBack()
        await Promise.all([this.#pair.delete(keys.pair), this.#known.set(keys.pair, 1, KNOWN_SECONDS)])
      },
    }
  }
}

/** A limit on anything else that costs: mails to an address, say. */
export function limiter(ctx: AppContext, name: string, points: number, seconds = WINDOW_SECONDS) {
  const query = async (statement: object) => poolOf(ctx.db).query(statement as never)
  return new RateLimiterPostgres({
    storeClient: { query },
    storeType: 'pool',
    tableName: 'rate_limit',
    tableCreated: true,
    clearExpiredByTimeout: false,
    keyPrefix: name,
    points,
    duration: seconds,
  })
}

/** Takes one point, and notes how to give it back. */
async function count(
  limit: RateLimiterPostgres,
  key: string,
  counted: (() => Promise<unknown>)[],
): Promise<void> {
  await takePoint(limit, key)
  counted.push(() => limit.reward(key))
}

/** @throws AppError `too-many-tries` when there are no points left. */
export async function takePoint(limit: RateLimiterPostgres, key: string): Promise<void> {
  try {
    await limit.consume(key)
  } catch (error) {
    if (!(error instanceof RateLimiterRes)) throw error
    throw new AppError('too-many-tries', 'Wait a little, then try again. Your records are safe.', {
      retryAfterSeconds: error.msBeforeNext / 1000,
    })
  }
}

function keysOf(account: string, address: string) {
  const network = networkOf(address)
  const name = keyOf(account)
  return { pair: `${name}:${network}`, address: network, account: name }
}

/** However an address is written it is one account; the table holds no address in clear. */
export function keyOf(account: string): string {
  return createHash('sha256').update(account.normalize('NFKC').trim().toLowerCase()).digest('base64url')
}
