import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { readSinglePoints as contract } from '#shared/contracts/single-points.ts'
import { singlePoints, type GroupFacts } from '#shared/engine/advice/single-points.ts'
import { READ_FROM } from '#shared/engine/procedures/subjects.ts'
import type { Category, Procedure } from '#shared/engine/vocabulary.ts'
import { addMonths } from '#shared/engine/plain-date.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

const PLACES: Statement = {
  name: 'single-places',
  text: `SELECT p.name, p.key_holders AS "keyHolders", count(k.id)::int AS kits FROM place p
    JOIN kit k ON k.group_id = p.group_id AND k.home_place_id = p.id AND k.retired_at IS NULL
    WHERE p.group_id = $1 AND p.retired_at IS NULL GROUP BY p.id ORDER BY p.name`,
}
const INSTRUMENTS_OF: Statement = {
  name: 'single-instruments',
  text: `SELECT category, array_agg(designation ORDER BY designation) AS designations FROM item
    WHERE group_id = $1 AND category = ANY($2) AND condition = 'serviceable' AND retired_at IS NULL
    GROUP BY category ORDER BY category`,
}
const CHARGERS: Statement = {
  name: 'single-chargers',
  text: `SELECT
      (SELECT count(*)::int FROM kit k WHERE k.group_id = $1 AND k.retired_at IS NULL
        AND EXISTS (SELECT FROM item i WHERE i.kit_id = k.id AND i.category = 'battery')
        AND NOT EXISTS (SELECT FROM item i WHERE i.kit_id = k.id AND i.category = 'charger'
          AND i.condition = 'serviceable')) AS "kitsWithout",
      ARRAY(SELECT designation FROM item WHERE group_id = $1 AND category = 'charger' AND kit_id IS NULL
        AND condition = 'serviceable' AND retired_at IS NULL ORDER BY designation) AS loose`,
}
/** Members who are still there; of one who left nothing more can be asked. */
const TESTERS: Statement = {
  name: 'single-testers',
  text: `SELECT t.procedure, array_agg(DISTINCT m.name) AS names FROM test t JOIN member m ON m.id = t.operator_id
    WHERE t.group_id = $1 AND t.performed_on >= $2::date AND t.procedure <> 'count' AND m.removed_at IS NULL
    GROUP BY t.procedure ORDER BY t.procedure`,
}
const MEMBERS: Statement = {
  name: 'single-members',
  text: `SELECT name, roles, licence_class IS NOT NULL AND (licence_expires_on IS NULL OR licence_expires_on >= $2::date)
      AS licensed
    FROM member WHERE group_id = $1 AND removed_at IS NULL ORDER BY name`,
}

interface MemberRow {
  [column: string]: unknown
  name: string
  roles: string[]
  licensed: boolean
}

/** Without one of these a group stands still: who lets people in, who answers at a call-out, who knows where things are. */
const ROLES = ['administrator', 'net-coordinator', 'quartermaster'] as const
const YEARS = 2

export async function readSinglePoints(tx: GroupTx): Promise<ResponseOf<typeof contract>> {
  const today = await tx.today()
  const [places, instruments, [chargers], testers, members] = await Promise.all([
    tx.sql<Row<'places'>>(PLACES, [tx.groupId]),
    tx.sql<{ category: Category; designations: string[] }>(INSTRUMENTS_OF, [tx.groupId, READ_FROM]),
    tx.sql<{ kitsWithout: number; loose: string[] }>(CHARGERS, [tx.groupId]),
    tx.sql<{ procedure: Procedure; names: string[] }>(TESTERS, [tx.groupId, addMonths(today, -12 * YEARS)]),
    tx.sql<MemberRow>(MEMBERS, [tx.groupId, today]),
  ])
  const points = singlePoints({
    places,
    instruments,
    chargers: chargers!,
    testers,
    roles: ROLES.map((role) => ({
      role: role.replace('-', ' '),
      names: members.filter(({ roles }) => roles.includes(role)).map(({ name }) => name),
    })),
    operators: members.filter(({ licensed }) => licensed).map(({ name }) => name),
  })
  return { at: tx.now.toISOString(), points }
}

type Row<Name extends keyof GroupFacts> = GroupFacts[Name] extends readonly (infer One)[]
  ? One & Record<string, unknown>
  : never
