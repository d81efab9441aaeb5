import type { GroupTx, Statement } from '../group-transaction.ts'

/** One entry of the audit log. `before` and `after` hold the changed fields only; never a password, token or cookie. */
export interface AuditEntry {
  /** Verb in the past: `kit-moved`, `test-recorded`. Permanent, like a problem code. */
  readonly action: string
  readonly subjectType: string
  readonly subjectId: string
  /** The kit on whose page the entry is shown too. */
  readonly kitId?: string | null
  /** A sentence without its actor: "moved DCL-11 from K-11 to K-03". */
  readonly summary: string
  readonly before?: object | null
  readonly after?: object | null
}

const INSERT: Statement = {
  name: 'insert-audit-event',
  text: `INSERT INTO audit_event
    (group_id, at, member_id, actor, address, request_id, action, subject_type, subject_id, kit_id, summary, before, after)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13)`,
}

/** Adds to the audit log in the transaction of the change itself. The application can add to it, never change it. */
export async function record(tx: GroupTx, entry: AuditEntry): Promise<void> {
  const { actor } = tx
  await tx.sql(INSERT, [
    tx.groupId,
    tx.now,
    actor.memberId,
    actor.name,
    actor.address,
    actor.requestId,
    entry.action,
    entry.subjectType,
    entry.subjectId,
    entry.kitId ?? null,
    entry.summary,
    entry.before ? JSON.stringify(entry.before) : null,
    entry.after ? JSON.stringify(entry.after) : null,
  ])
}

/** The fields that differ between two versions of a record, as `before` and `after` of an audit entry. */
export function changedFields<T extends object>(
  old: T,
  changes: Partial<T>,
): { before: object; after: object } {
  const keys = (Object.keys(changes) as (keyof T)[]).filter(
    (key) => JSON.stringify(old[key] ?? null) !== JSON.stringify(changes[key] ?? null),
  )
  return {
    before: Object.fromEntries(keys.map((key) => [key, old[key] ?? null])),
    after: Object.fromEntries(keys.map((key) => [key, changes[key] ?? null])),
  }
}
