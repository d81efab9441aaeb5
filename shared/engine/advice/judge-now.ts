import { dossierOf, momentOf } from '../readiness/moment.ts'
import { judgementAt, type Judgement } from '../readiness/period-at.ts'
import type { EpochMs, KitState } from '../readiness/types.ts'

/** The verdict at one instant. */
export function judgeNow(state: KitState, at: EpochMs): Judgement {
  return judgementAt(momentOf(dossierOf(state), at))
}
