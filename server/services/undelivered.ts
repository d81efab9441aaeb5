import { DEAD_LETTER } from '../jobs/queues.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'

const MAILS: Statement = {
  name: 'undelivered-mails',
  text: `SELECT l.id, m.name AS "memberName", l.recipient, l.subject, l.queued_at AS "queuedAt", l.tries,
      coalesce(l.last_error, '') AS "lastError", l.given_up_at AS "givenUpAt"
    FROM mail l LEFT JOIN member m ON m.group_id = l.group_id AND m.id = l.member_id
    WHERE l.group_id = $1 AND l.sent_at IS NULL AND l.last_error IS NOT NULL ORDER BY l.queued_at DESC LIMIT 100`,
}
const JOBS: Statement = {
  name: 'dead-jobs',
  text: `SELECT id, coalesce(data ->> 'work', 'send-mail') AS work, created_on AS "failedAt" FROM pgboss.job
    WHERE name = $2 AND data ->> 'groupId' = $1::text ORDER BY created_on DESC LIMIT 100`,
}

interface UndeliveredMail {
  id: string
  memberName: string | null
  recipient: string
  subject: string
  queuedAt: Date
  tries: number
  lastError: string
  givenUpAt: Date | null
}

/** What could not be delivered or done for this group, newest first. */
export async function undeliveredOf(tx: GroupTx) {
  const mails = await tx.sql<UndeliveredMail & Record<string, unknown>>(MAILS, [tx.groupId])
  const jobs = await tx.sql<{ id: string; work: string; failedAt: Date }>(JOBS, [tx.groupId, DEAD_LETTER])
  return {
    mails: mails.map((mail) => ({
      ...mail,
      queuedAt: mail.queuedAt.toISOString(),
      givenUpAt: mail.givenUpAt?.toISOString() ?? null,
    })),
    jobs: jobs.map((job) => ({ ...job, failedAt: job.failedAt.toISOString() })),
  }
}
