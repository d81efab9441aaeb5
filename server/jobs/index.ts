import PgBoss from 'pg-boss'
import type { AppContext } from '../context.ts'
import { poolOf } from '../pool.ts'
import { deliverMail, sweepMail } from '../services/deliver-mail.ts'
import type { MailTransport } from '../services/mail-transport.ts'
import { remindAllGroups } from '../services/reminders/morning-reminders.ts'
import { refreshAllBoards } from '../services/refresh-boards.ts'
import { QUEUES, SCHEDULES, type QueueName } from './queues.ts'

/** Slow polling keeps an idle server quiet; a queue's throughput is batchSize / pollingIntervalSeconds. */
const POLL_SECONDS: Record<QueueName, number> = {
  'send-mail': 1,
  'sweep-mail': 5,
  'morning-reminders': 5,
  'refresh-boards': 5,
}

export interface Jobs {
  stop(): Promise<void>
}

/** Starts the workers and their schedule. Several processes may run them: each job is handed to one. */
export async function startJobs(ctx: AppContext, transport: MailTransport): Promise<Jobs> {
  const executeSql = (text: string, values: unknown[] = []) => poolOf(ctx.db).query(text, values)
  const boss = new PgBoss({ db: { executeSql }, migrate: false, maintenanceIntervalSeconds: 10 })
  boss.on('error', (error) => ctx.log.warn({ err: error }, 'job queue'))
  await boss.start()
  const handlers: Record<QueueName, (data: object) => Promise<void>> = {
    'send-mail': (data) => deliverMail(ctx, transport, data as { groupId: string; mailId: string }),
    'sweep-mail': () => sweepMail(ctx, transport),
    'morning-reminders': () => remindAllGroups(ctx),
    'refresh-boards': () => refreshAllBoards(ctx),
  }
  for (const queue of Object.keys(QUEUES) as QueueName[]) {
    await boss.work<object>(
      queue,
      { batchSize: 50, pollingIntervalSeconds: POLL_SECONDS[queue] },
      async (jobs) => {
        for (const data of distinct(jobs.map((job) => job.data))) await handlers[queue](data)
      },
    )
    const cron = SCHEDULES[queue]
    if (cron) await boss.schedule(queue, cron)
  }
  return {
    stop: async () => {
      await boss.stop({ graceful: true, wait: true, timeout: 8000 })
      transport.close()
    },
  }
}

/** Scheduled jobs carry no data: one run serves all that piled up. */
function distinct(all: readonly object[]): object[] {
  return [...new Map(all.map((data) => [JSON.stringify(data ?? {}), data ?? {}])).values()]
}
