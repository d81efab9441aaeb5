import type { z } from 'zod'
import type { getRegistryOptions } from '#shared/contracts/registry-options.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import type { By } from './thing.ts'

type Answer = z.input<typeof getRegistryOptions.response>
type KitKind = Omit<Answer['kitKinds'][number], 'positions'>
type Position = Answer['kitKinds'][number]['positions'][number] & { kit_kind_id: string }

const list = (name: string, text: string): Statement => ({ name: `options-${name}`, text })

const KIT_KINDS = list(
  'kit-kinds',
  'SELECT id, code, name FROM kit_kind WHERE group_id = $1 AND retired_at IS NULL ORDER BY lower(code)',
)
const POSITIONS = list(
  'positions',
  `SELECT id, kit_kind_id, name, category, quantity, vital FROM position
    WHERE group_id = $1 AND removed_at IS NULL ORDER BY ordinal, id`,
)
const PLACES = list(
  'places',
  'SELECT id, name FROM place WHERE group_id = $1 AND retired_at IS NULL ORDER BY lower(name)',
)
const BUILD_SHEETS = list(
  'build-sheets',
  'SELECT id, name, category FROM build_sheet WHERE group_id = $1 AND retired_at IS NULL ORDER BY lower(name)',
)
const BATCHES = list(
  'batches',
  `SELECT id, name, build_sheet_id AS "buildSheetId" FROM batch
    WHERE group_id = $1 AND retired_at IS NULL ORDER BY lower(name)`,
)
const MEMBERS = list(
  'members',
  `SELECT id, name, call_sign AS "callSign" FROM member
    WHERE group_id = $1 AND removed_at IS NULL ORDER BY lower(name), id`,
)

/** The short lists that forms choose from, in one round trip. */
export function registryOptions(ctx: AppContext, by: By): Promise<Answer> {
  return inGroup(ctx, by, async (tx) => {
    const group = [tx.groupId]
    const [kitKinds, positions, places, buildSheets, batches, members] = await Promise.all([
      tx.sql<KitKind>(KIT_KINDS, group),
      tx.sql<Position>(POSITIONS, group),
      tx.sql<Answer['places'][number]>(PLACES, group),
      tx.sql<Answer['buildSheets'][number]>(BUILD_SHEETS, group),
      tx.sql<Answer['batches'][number]>(BATCHES, group),
      tx.sql<Answer['members'][number]>(MEMBERS, group),
    ])
    const positionsOf = (kind: KitKind) => positions.filter((position) => position.kit_kind_id === kind.id)
    return {
      kitKinds: kitKinds.map((kind) => ({ ...kind, positions: positionsOf(kind) })),
      places,
      buildSheets,
      batches,
      members,
    }
  })
}
