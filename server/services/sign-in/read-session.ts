import type { SessionView } from '#shared/contracts/session.ts'
import type { Caller } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import type { Role } from '#shared/contracts/roles.ts'

const READ: Statement = {
  name: 'read-session-view',
  text: `SELECT m.name, m.call_sign, m.roles, m.temperature_unit, m.length_unit, g.name AS group_name, g.short_name,
      g.time_zone, g.demo
    FROM member m JOIN groups g ON g.id = m.group_id WHERE m.group_id = $1 AND m.id = $2`,
}

interface Row {
  name: string
  call_sign: string | null
  roles: Role[]
  temperature_unit: 'C' | 'F'
  length_unit: 'm' | 'ft'
  group_name: string
  short_name: string
  time_zone: string
  demo: boolean
}

export const SIGNED_OUT: SessionView = { member: null }

/** Who the caller is, for the client. */
export async function readSessionView(ctx: AppContext, by: Caller): Promise<SessionView> {
  const [row] = await inGroup(ctx, by, (tx) => tx.sql<Row>(READ, [tx.groupId, by.memberId]))
  return row ? viewOf(row, by.memberId, by.roles) : SIGNED_OUT
}

/** The same for a member whose password was given in this very request: all roles are in force. */
export async function readFreshSessionView(
  ctx: AppContext,
  { memberId, groupId }: { memberId: string; groupId: string },
  actor: Caller['actor'],
): Promise<SessionView> {
  const [row] = await inGroup(ctx, { groupId, actor }, (tx) => tx.sql<Row>(READ, [tx.groupId, memberId]))
  return row ? viewOf(row, memberId, row.roles) : SIGNED_OUT
}

function viewOf(row: Row, id: string, roles: readonly Role[]): SessionView {
  return {
    member: {
      id,
      name: row.name,
      callSign: row.call_sign,
      roles: [...roles],
      heldRoles: row.roles,
      units: { temperature: row.temperature_unit, length: row.length_unit },
      group: {
        name: row.group_name,
        shortName: row.short_name,
        timeZone: row.time_zone,
        demo: row.demo,
      },
    },
  }
}
