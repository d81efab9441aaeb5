import { v5 as uuidv5 } from 'uuid'
import type { BodyOf } from '#shared/contracts/endpoint.ts'
import type { raiseWeather as contract, WeatherEffect } from '#shared/contracts/weather-events.ts'
import { EXPOSED } from '#shared/engine/advice/exposed.ts'
import { holdsUntil } from '#shared/engine/readiness/horizon.ts'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { KitState, RaisedCheck } from '#shared/engine/readiness/types.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { createdBefore } from '../created-before.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { lockKits } from '../lock-kits.ts'
import { lockNewId } from '../registry/locks.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { insertRaisedCheck } from './raise-check.ts'
import { readRaisedChecks } from './raised-check-rows.ts'

type Body = BodyOf<typeof contract>
type Weather = Omit<Body, 'eventId'>

interface ExposedRow {
  [column: string]: unknown
  id: string
  designation: string
  category: Category
  kit_id: string | null
  kit: string | null
}

const MOST_ITEMS = 1000

/** In use, of the categories $2, loose or packed at the places $3, or in a kit that is out where $4. */
const EXPOSED_ITEMS: Statement = {
  name: 'exposed-items',
  text: `SELECT i.id, i.designation, i.category, i.kit_id, k.designation AS kit FROM item i
    LEFT JOIN kit k ON k.id = i.kit_id
    WHERE i.group_id = $1 AND i.retired_at IS NULL AND i.condition = 'serviceable' AND i.category = ANY($2)
      AND (i.place_id = ANY($3::uuid[]) OR (k.place_id = ANY($3::uuid[]) AND k.availability <> 'assigned')
        OR ($4 AND k.availability = 'assigned'))
    ORDER BY k.designation NULLS LAST, i.designation, i.id LIMIT $5`,
}

/** What the event would do; nothing is written. */
export async function previewWeather(tx: GroupTx, body: Weather): Promise<WeatherEffect> {
  return effectOf(tx, await exposedItems(tx, body), { body, eventId: WOULD_BE })
}

/** Stands for an event that does not exist yet. */
const WOULD_BE = '00000000-0000-7000-8000-000000000000'

const RAISED = 'weather-event-raised'

/**
 * Raises a check of every exposed item, in one transaction, each with the reason and its entry in the history. Sent
 * again, the same event raises nothing more, also where more stands outdoors by then.
 */
export async function raiseWeather(tx: GroupTx, { eventId, ...body }: Body): Promise<WeatherEffect> {
  await lockNewId(tx, eventId)
  const event = { body, eventId }
  if (await createdBefore(tx, { id: eventId, action: RAISED, body }))
    return effectOf(tx, await alreadyRaised(tx, event), event)
  await lockKits(tx, kitIdsOf(await exposedItems(tx, body)))
  const items = await exposedItems(tx, body)
  const effect = await effectOf(tx, items, event)
  if (items.length === 0) return effect
  await raiseAll(tx, items, event)
  await rewriteReadiness(tx, kitIdsOf(items))
  return effect
}

/** Of what is exposed there now, the items of which this event raised a check. */
async function alreadyRaised(tx: GroupTx, { eventId, body }: Event): Promise<ExposedRow[]> {
  const items = await exposedItems(tx, body)
  const ids = items.map(({ id }) => checkId(eventId, id))
  const raised = new Set((await readRaisedChecks(tx, ids)).map(({ itemId }) => itemId))
  return items.filter(({ id }) => raised.has(id))
}

interface Event {
  readonly eventId: string
  readonly body: Weather
}

async function raiseAll(tx: GroupTx, items: readonly ExposedRow[], { eventId, body }: Event): Promise<void> {
  const { reason, dueOn, doubtsEarlier } = body
  for (const { id, designation, category, kit_id: kitId } of items) {
    const subject = { type: 'item', id, designation, kitId } as const
    const procedure = EXPOSED[category]!
    const check = { procedure, cause: 'storm', reason, dueOn, doubtsEarlier } as const
    await insertRaisedCheck(tx, { id: checkId(eventId, id), subject, ...check })
  }
  const what = items.length === 1 ? '1 exposed item' : `${items.length} exposed items`
  await record(tx, {
    action: RAISED,
    subjectType: 'weather-event',
    subjectId: eventId,
    summary: `made ${what} due after weather: ${reason}`,
    after: body,
  })
}

const checkId = (eventId: string, itemId: string) => uuidv5(itemId, eventId)

const kitIdsOf = (items: readonly ExposedRow[]) => [
  ...new Set(items.flatMap(({ kit_id: kitId }) => (kitId === null ? [] : [kitId]))),
]

async function exposedItems(tx: GroupTx, { placeIds, onIssue }: Weather): Promise<ExposedRow[]> {
  const categories = Object.keys(EXPOSED)
  const values = [tx.groupId, categories, placeIds, onIssue, MOST_ITEMS + 1]
  const rows = await tx.sql<ExposedRow>(EXPOSED_ITEMS, values)
  if (rows.length <= MOST_ITEMS) return rows
  throw invalidField(
    '#/placeIds',
    `More than ${MOST_ITEMS} things are exposed there: take fewer places at once.`,
  )
}

async function effectOf(tx: GroupTx, items: readonly ExposedRow[], event: Event): Promise<WeatherEffect> {
  const loaded = await loadKitStates(tx, kitIdsOf(items))
  const kits = loaded.flatMap(({ state }) => {
    const own = items.filter(({ kit_id: kitId }) => kitId === state.kit.id)
    const { before, after } = withoutAndWith(tx, state, { own, ...event })
    return changeOf(tx, before, after)
  })
  return {
    checks: items.map(({ id, designation, category, kit }) => ({
      itemId: id,
      designation,
      kit,
      procedure: EXPOSED[category]!,
    })),
    kits: kits.sort((a, b) => a.designation.localeCompare(b.designation)),
  }
}

/** The kit without the checks of the event, whether they were raised already or not, and with them. */
function withoutAndWith(
  tx: GroupTx,
  state: KitState,
  { own, body, eventId }: Event & { own: readonly ExposedRow[] },
): { before: KitState; after: KitState } {
  const checks = own.map(({ id, category }): RaisedCheck => ({
    id: checkId(eventId, id),
    subjectId: id,
    procedure: EXPOSED[category]!,
    band: null,
    reason: body.reason,
    doubtsEarlier: body.doubtsEarlier,
    raisedAt: tx.now.getTime(),
    dueOn: body.dueOn,
  }))
  const ids = new Set(checks.map(({ id }) => id))
  const others = state.raisedChecks.filter(({ id }) => !ids.has(id))
  return {
    before: { ...state, raisedChecks: others },
    after: { ...state, raisedChecks: [...others, ...checks] },
  }
}

function changeOf(tx: GroupTx, before: KitState, after: KitState): WeatherEffect['kits'] {
  const { id: kitId, designation } = before.kit
  const [was, becomes] = [before, after].map((state) => standingOf(kitTimeline(state, tx.now.getTime())))
  if (was!.verdict === becomes!.verdict && was!.holdsUntil === becomes!.holdsUntil) return []
  return [{ kitId, designation, before: was!, after: becomes! }]
}

function standingOf(periods: readonly Period[]): WeatherEffect['kits'][number]['before'] {
  const until = holdsUntil(periods)
  return { verdict: periods[0]!.verdict, holdsUntil: until === null ? null : new Date(until).toISOString() }
}
