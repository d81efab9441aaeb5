import { ref } from 'vue'
import { idByContent } from '@/api/new-id.ts'
import type { BodyOf } from '#shared/contracts/endpoint.ts'
import { moveItem } from '#shared/contracts/movements.ts'
import { callApi } from '@/api/call-api.ts'
import { useProblem } from './useProblem.ts'

export type ItemLocation = BodyOf<typeof moveItem>['from']
export type ItemTarget = BodyOf<typeof moveItem>['to']

/** Moves one item; pressing twice or sending again moves once. */
export function useMoveItem() {
  const busy = ref(false)
  const { error, run } = useProblem()
  const ids = idByContent()

  async function move(
    itemId: string,
    body: { from: ItemLocation; to: ItemTarget; reason: string },
  ): Promise<boolean> {
    const moveId = ids.of({ itemId, ...body })
    busy.value = true
    const done = await run(() => callApi(moveItem, { params: { itemId }, body: { moveId, ...body } }))
    busy.value = false
    if (done) ids.done()
    return done !== undefined
  }

  return { busy, error, move }
}

/** Where an item is, as its record says it. */
export function locationOf(item: {
  readonly kit: { readonly id: string } | null
  readonly position: { readonly id: string } | null
  readonly place: { readonly id: string } | null
}): ItemLocation {
  if (item.kit && item.position) return { kind: 'position', kitId: item.kit.id, positionId: item.position.id }
  return item.place ? { kind: 'place', placeId: item.place.id } : { kind: 'nowhere' }
}
