import { createHash } from 'node:crypto'
import { applySteps } from '#shared/engine/advice/apply-steps.ts'
import { doable, tellSteps, type ToldStep } from '#shared/engine/advice/doable-steps.ts'
import type { WhatIfStep } from '#shared/engine/advice/steps.ts'
import { worldOf, type World } from '#shared/engine/advice/world.ts'
import type { WhatIfStepBody } from '#shared/contracts/what-if.ts'
import { isFailure, type Failure, type Outcome } from '#shared/engine/outcome.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { loadKitStates, type LoadedKit } from '../load-kit-states.ts'
import { loadSpares } from '../readiness/spare-states.ts'

/** Kits that are named ($2), that hold an item named, or that were tested with an instrument named. */
const CONCERNED: Statement = {
  name: 'what-if-kits',
  text: `SELECT id FROM kit WHERE group_id = $1 AND retired_at IS NULL AND (id = ANY($2::uuid[])
      OR id IN (SELECT kit_id FROM item WHERE group_id = $1 AND id = ANY($2::uuid[]))
      OR id IN (SELECT coalesce(t.kit_id, i.kit_id) FROM test t LEFT JOIN item i ON i.id = t.item_id
        WHERE t.group_id = $1 AND t.instrument_id = ANY($2::uuid[])))
    ORDER BY designation`,
}

/** A what-if with everything that its answer rests on. */
export interface Question {
  readonly loaded: readonly LoadedKit[]
  readonly spares: readonly KitState[]
  readonly steps: readonly WhatIfStep[]
  readonly told: readonly ToldStep[]
  readonly before: World
  /** Once what can be done here is done. */
  readonly atOnce: World
  readonly basis: string
}

/** Reads what the steps are about. A step that does not fit is a fault of its field. */
export async function readQuestion(tx: GroupTx, body: readonly WhatIfStepBody[]): Promise<Question> {
  const steps = body.map((step) => withDecider(tx, step))
  const ids = idsIn(steps)
  const [kitIds, everySpare] = await Promise.all([concernedKits(tx, ids), loadSpares(tx)])
  const loaded = await loadKitStates(tx, kitIds)
  const spares = everySpare.map(({ state }) => state)
  const before = worldOf(
    loaded.map(({ state }) => state),
    spares,
  )
  const at = tx.now.getTime()
  const told = fitting(tellSteps(before, steps, at))
  const atOnce = fitting(applySteps(before, doable(told), at))
  const named = spares.filter(({ kit }) => ids.includes(kit.id))
  return { loaded, spares, steps, told, before, atOnce, basis: digestOf([...before.kits.values(), ...named]) }
}

export async function concernedKits(tx: GroupTx, ids: readonly string[]): Promise<string[]> {
  const rows = await tx.sql<{ id: string }>(CONCERNED, [tx.groupId, ids])
  return rows.map(({ id }) => id)
}

function withDecider({ actor }: GroupTx, step: WhatIfStepBody): WhatIfStep {
  if (step.kind !== 'skip' || !step.accept) return step as WhatIfStep
  return { ...step, accept: { ...step.accept, by: actor.name } }
}

const ID = /[0-9a-f]{8}-[0-9a-f-]{27}/g

/** Every id that the steps name, of kits, items and positions alike. */
export function idsIn(steps: readonly object[]): string[] {
  return [...new Set(JSON.stringify(steps).match(ID) ?? [])]
}

export function fitting<T>(outcome: Outcome<T>): T {
  if (isFailure(outcome)) throw invalidStep(outcome)
  return outcome
}

function invalidStep({ field = 'steps', message }: Failure) {
  return invalidField(`#/${field.replace(/\[(\d+)\]/, '/$1')}`, message)
}

/** The same for the same states. Versions of a policy never change, so their ids stand for them. */
export function digestOf(states: readonly KitState[]): string {
  const said = states.map((state) => ({ ...state, policies: state.policies.map(({ id }) => id) }))
  return createHash('sha256').update(JSON.stringify(said)).digest('base64url')
}
