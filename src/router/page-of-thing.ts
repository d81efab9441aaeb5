import type { RouteLocationRaw } from 'vue-router'

/** The page of a kit or an item. */
export function pageOfThing({
  kind,
  id,
}: {
  readonly kind: 'kit' | 'item'
  readonly id: string
}): RouteLocationRaw {
  return kind === 'kit' ? { name: 'kit', params: { kitId: id } } : { name: 'item', params: { itemId: id } }
}
