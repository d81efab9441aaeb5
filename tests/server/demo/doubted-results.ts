import { doubtAbout } from '#shared/engine/readiness/doubt.ts'
import { dossierOf, momentOf } from '#shared/engine/readiness/moment.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { loadKitStates } from '#server/services/load-kit-states.ts'
import { loadSpares } from '#server/services/readiness/spare-states.ts'
import type { DemoApp } from '../../support/demo.ts'

/** Every result of the group, in kits and on shelves, that its instrument's calibration puts in doubt now. */
export async function inDoubtByCalibration(demo: DemoApp): Promise<string[]> {
  const kits = await demo.rows<{ id: string }>('SELECT id FROM kit WHERE retired_at IS NULL')
  const states = await demo.app.inGroup({ id: demo.groupId }, async (tx) => [
    ...(await loadKitStates(
      tx,
      kits.map(({ id }) => id),
    )),
    ...(await loadSpares(tx)),
  ])
  const now = demo.app.clock.now().getTime()
  return states.flatMap(({ state }) => doubtedIn(state, now)).sort()
}

function doubtedIn(state: KitState, now: number): string[] {
  const moment = momentOf(dossierOf(state), now)
  const nameOf = new Map(state.items.map(({ id, designation }) => [id, designation]))
  return state.evidence.flatMap((test) => {
    const doubt = doubtAbout(moment, test, null)
    const name = nameOf.get(test.subjectId)
    return doubt?.kind.startsWith('calibration') && name ? [`${name} ${test.procedure}`] : []
  })
}
