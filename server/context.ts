import type { Logger } from 'pino'
import type { DataSource } from 'typeorm'
import type { Clock } from './clock.ts'
import type { Config } from './config.ts'

/** What the whole application shares. Nothing in here changes after the start. */
export interface AppContext {
  readonly config: Config
  readonly db: DataSource
  readonly clock: Clock
  readonly log: Logger
}
