import { checksAt, checksOfItem } from '#shared/engine/readiness/checks.ts'
import { dossierOf, momentOf } from '#shared/engine/readiness/moment.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { kitsInUse } from '../kits-in-use.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { loadSpares } from './spare-states.ts'

/** Kits whose states are in memory at once. */
const STEP = 200

/** The checks of one kit with all that is in it, or of the spares of one place (`kit` is then null). */
export interface CheckedPart {
  readonly kit: KitState['kit'] | null
  readonly state: KitState
  readonly placeId: string | null
  readonly checks: readonly CheckState[]
}

/** Every check that the policy asks for in the group today, in kits and on shelves; of one kit only, when named. */
export async function checksOfGroup(tx: GroupTx, kitId: string | null = null): Promise<CheckedPart[]> {
  const kits = await kitsInUse(tx, kitId)
  const parts: CheckedPart[] = []
  for (let at = 0; at < kits.length; at += STEP) {
    for (const { state, placeId } of await loadKitStates(tx, kits.slice(at, at + STEP)))
      parts.push({ kit: state.kit, state, placeId, checks: checksAt(state, tx.now.getTime()) })
  }
  return kitId === null ? [...parts, ...(await checksOfSpares(tx))] : parts
}

async function checksOfSpares(tx: GroupTx): Promise<CheckedPart[]> {
  return (await loadSpares(tx)).map(({ state, placeId }) => {
    const moment = momentOf(dossierOf(state), tx.now.getTime())
    const checks = state.items.flatMap((item) => checksOfItem(moment, item, { vital: false, bands: [] }))
    return { kit: null, state, placeId, checks }
  })
}
