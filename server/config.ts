import { z } from 'zod'

const port = z.coerce.number().int().min(0).max(65_535)
const url = (protocols: string) =>
  z.string().regex(new RegExp(`^(${protocols})://`), `Expected ${protocols}://…`)

const environment = z.object({
  NODE_ENV: z.enum(['production', 'development', 'test']).default('production'),
  HOST: z.string().default('127.0.0.1'),
  PORT: port.default(8080),
  /** The address members use: links in mail are built from it, never from a Host header. */
  PUBLIC_URL: url('https?').transform((value) => value.replace(/\/+$/, '')),
  /** The application's role: neither owner nor superuser. */
  DATABASE_URL: url('postgres(?:ql)?'),
  /** The owner's role, for migrations only. Absent: DATABASE_URL migrates and the role is dropped to `halyard_app`. */
  DATABASE_OWNER_URL: url('postgres(?:ql)?').optional(),
  SMTP_URL: url('smtps?'),
  MAIL_FROM: z.string().min(3).default('Halyard <halyard@localhost>'),
  SESSION_SECRET: z.string().min(32, 'At least 32 characters, made at random.'),
  LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'fatal', 'silent']).default('info'),
  /** How many proxies in front may be believed about the caller's address. */
  TRUST_PROXY: z.coerce.number().int().min(0).max(5).default(0),
  /** Largest number of database connections of this process. */
  DATABASE_POOL: z.coerce.number().int().min(2).max(100).default(12),
  /** `off`: this process serves requests only and leaves mail and reminders to another. */
  JOBS: z.enum(['on', 'off']).default('on'),
})

export type Config = Readonly<{
  env: 'production' | 'development' | 'test'
  host: string
  port: number
  publicUrl: string
  databaseUrl: string
  databaseOwnerUrl: string
  smtpUrl: string
  mailFrom: string
  sessionSecret: string
  logLevel: string
  trustProxy: number
  databasePool: number
  jobs: boolean
}>

export class ConfigError extends Error {}

/** Reads the environment once. A missing or weak setting ends the start with its name and the reason. */
export function readConfig(env: NodeJS.ProcessEnv): Config {
  const parsed = environment.safeParse(env)
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`)
    throw new ConfigError(`These settings are missing or wrong:\n  ${lines.join('\n  ')}`)
  }
  const value = parsed.data
  return {
    env: value.NODE_ENV,
    host: value.HOST,
    port: value.PORT,
    publicUrl: value.PUBLIC_URL,
    databaseUrl: value.DATABASE_URL,
    databaseOwnerUrl: value.DATABASE_OWNER_URL ?? value.DATABASE_URL,
    smtpUrl: value.SMTP_URL,
    mailFrom: value.MAIL_FROM,
    sessionSecret: value.SESSION_SECRET,
    logLevel: value.LOG_LEVEL,
    trustProxy: value.TRUST_PROXY,
    databasePool: value.DATABASE_POOL,
    jobs: value.JOBS === 'on',
  }
}
