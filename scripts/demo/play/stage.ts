import type { AppContext } from '#server/context.ts'
import type { By } from '#server/services/registry/thing.ts'
import type { Calendar } from '../calendar.ts'
import type { Ids } from '../ids.ts'

export type Location =
  | { readonly kind: 'position'; readonly kitId: string; readonly positionId: string }
  | { readonly kind: 'place'; readonly placeId: string }
  | { readonly kind: 'nowhere' }

/** What stays the same from the first step to the last. */
export interface Theatre {
  readonly groupId: string
  readonly calendar: Calendar
  readonly ids: Ids
  /** Where each item is as of the steps played so far. */
  readonly where: Map<string, Location>
  /** Password hashes by person, made beforehand. */
  readonly passwordHashes: ReadonlyMap<string, string>
}

/** One step: the services see its time and its member, as they would see a request of that day. */
export interface Stage extends Theatre {
  readonly ctx: AppContext
  readonly by: By & { readonly memberId: string }
  readonly now: Date
}
