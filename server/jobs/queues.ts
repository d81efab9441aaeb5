import type PgBoss from 'pg-boss'

/** What failed for good waits here; administrators see it. */
export const DEAD_LETTER = 'dead-letter'

/** The work that runs outside a request. Every handler may run twice, or twice at once, without harm. */
export const QUEUES = {
  'send-mail': { retryLimit: 5, retryDelay: 5, retryBackoff: true, expireInSeconds: 120 },
  'sweep-mail': { retryLimit: 1, expireInSeconds: 60 },
  'morning-reminders': { retryLimit: 3, retryDelay: 10, expireInSeconds: 120 },
  'refresh-boards': { retryLimit: 1, expireInSeconds: 60 },
  'rejudge-groups': { retryLimit: 1, expireInSeconds: 1800 },
} as const satisfies Record<string, Omit<PgBoss.Queue, 'name'>>

export type QueueName = keyof typeof QUEUES

/** Cron times in UTC. The work itself finds what is due, so a run missed while the server was down is made up once. */
export const SCHEDULES: Partial<Record<QueueName, string>> = {
  'sweep-mail': '* * * * *',
  'morning-reminders': '*/10 * * * *',
  'refresh-boards': '* * * * *',
  'rejudge-groups': '* * * * *',
}
