import { changeProfile, readProfile } from '#shared/contracts/profile.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { changeProfileOf, readProfileOf } from '../services/people/profile.ts'
import type { EndpointRouter } from './endpoint.ts'

export function profileRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(readProfile, ({ by }) => inGroup(ctx, by, (tx) => readProfileOf(tx, by.memberId)))
  endpoints.add(changeProfile, ({ by, body, version }) =>
    inGroup(ctx, by, (tx) => changeProfileOf(tx, { memberId: by.memberId, version, body })),
  )
}
