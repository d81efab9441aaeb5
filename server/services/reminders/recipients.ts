import type { Role } from '#shared/contracts/roles.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

export interface Recipient {
  readonly memberId: string
  readonly name: string
  readonly email: string
  /** Quartermasters get the group's digest; everybody else the kits they answer for. */
  readonly scope: 'group' | 'own'
  readonly kitIds: ReadonlySet<string>
}

// Who has a kit answers for it; otherwise whoever is named as responsible.
const RECIPIENTS: Statement = {
  name: 'reminder-recipients',
  text: `SELECT m.id, m.name, m.email, m.roles,
      array_remove(array_agg(k.id), NULL) AS kit_ids
    FROM member m
    LEFT JOIN kit k ON k.group_id = m.group_id AND k.retired_at IS NULL
      AND coalesce(k.holder_id, k.responsible_id) = m.id
    WHERE m.group_id = $1 AND m.removed_at IS NULL AND m.wants_reminders AND m.email IS NOT NULL
      AND NOT EXISTS (SELECT FROM reminder r WHERE r.group_id = m.group_id AND r.member_id = m.id AND r.on_day = $2)
    GROUP BY m.id ORDER BY m.id`,
}

/** Members who want reminders and did not get today's yet. */
export async function recipientsOf(tx: GroupTx, today: string): Promise<Recipient[]> {
  const rows = await tx.sql<{ id: string; name: string; email: string; roles: Role[]; kit_ids: string[] }>(
    RECIPIENTS,
    [tx.groupId, today],
  )
  return rows.map((row) => ({
    memberId: row.id,
    name: row.name,
    email: row.email,
    scope: row.roles.includes('quartermaster') ? 'group' : 'own',
    kitIds: new Set(row.kit_ids),
  }))
}
