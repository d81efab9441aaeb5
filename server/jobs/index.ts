import PgBoss from 'pg-boss'
import type { AppContext } from '../context.ts'
import { Listener } from '../listener.ts'
import { poolOf } from '../pool.ts'
import { deliverMail, sweepMail } from '../services/deliver-mail.ts'
import type { MailTransport } from '../services/mail-transport.ts'
import { remindAllGroups } from '../services/reminders/morning-reminders.ts'
import { rejudgeGroups } from '../services/readiness/rejudge-groups.ts'
import { refreshAllBoards } from '../services/refresh-boards.ts'
import { QUEUES, SCHEDULES, type QueueName } from './queues.ts'

/** Polling is a safety net only, for what was told while nobody listened: `enqueue` wakes the worker of its queue. */
const PACE = { batchSize: 50, pollingIntervalSeconds: 5 } as const

export interface Jobs {
  stop(): Promise<void>
}

/** Starts the workers and their schedule. Several processes may run them: each job is handed to one. */
export async function startJobs(ctx: AppContext, transport: MailTransport): Promise<Jobs> {
  const executeSql = (text: string, values: unknown[] = []) => poolOf(ctx.db).query(text, values)
  const boss = new PgBoss({ db: { executeSql }, migrate: false, maintenanceIntervalSeconds: 10 })
  boss.on('error', (error) => ctx.log.warn({ err: error }, 'job queue'))
  await boss.start()
  const listener = wakeWhenQueued(ctx, boss, await startWorkers(ctx, boss, transport))
  return {
    stop: async () => {
      listener.close()
      await boss.stop({ graceful: true, wait: true, timeout: 8000 })
      transport.close()
    },
  }
}

/** One worker a queue; the answer is its id. */
async function startWorkers(
  ctx: AppContext,
  boss: PgBoss,
  transport: MailTransport,
): Promise<Map<string, string>> {
  const handlers: Record<QueueName, (data: object) => Promise<void>> = {
    'send-mail': (data) => deliverMail(ctx, transport, data as { groupId: string; mailId: string }),
    'sweep-mail': () => sweepMail(ctx, transport),
    'morning-reminders': () => remindAllGroups(ctx),
    'refresh-boards': () => refreshAllBoards(ctx),
    'rejudge-groups': () => rejudgeGroups(ctx),
  }
  const workers = new Map<string, string>()
  for (const queue of Object.keys(QUEUES) as QueueName[]) {
    const worker = await boss.work<object>(queue, PACE, async (jobs) => {
      // A full batch may not be all: what one transaction queues is told once, so nobody else wakes the worker for it.
      const known = jobs.length === PACE.batchSize ? workers.get(queue) : undefined
      if (known !== undefined) boss.notifyWorker(known)
      for (const data of distinct(jobs.map((job) => job.data))) await handlers[queue](data)
    })
    workers.set(queue, worker)
    const cron = SCHEDULES[queue]
    if (cron) await boss.schedule(queue, cron)
  }
  return workers
}

/** A job is taken up when its transaction ends, not when the next poll comes. */
function wakeWhenQueued(ctx: AppContext, boss: PgBoss, workers: ReadonlyMap<string, string>): Listener {
  const wake = (ids: Iterable<string>) => [...ids].forEach((id) => boss.notifyWorker(id))
  const listener = new Listener({
    url: ctx.config.databaseUrl,
    name: 'jobs',
    channels: ['halyard_job'],
    log: ctx.log,
    onMessage: (_channel, queue) => wake([workers.get(queue)].filter((id) => id !== undefined)),
    onConnected: () => wake(workers.values()),
  })
  listener.open()
  return listener
}

/** Scheduled jobs carry no data: one run serves all that piled up. */
function distinct(all: readonly object[]): object[] {
  return [...new Map(all.map((data) => [JSON.stringify(data ?? {}), data ?? {}])).values()]
}
