import { listHistory } from '#shared/contracts/history.ts'
import { getRegistryOptions } from '#shared/contracts/registry-options.ts'
import { findTag } from '#shared/contracts/tags.ts'
import type { AppContext } from '../context.ts'
import { findTag as find } from '../services/registry/find-tag.ts'
import { listHistory as list } from '../services/registry/list-history.ts'
import { registryOptions } from '../services/registry/registry-options.ts'
import type { EndpointRouter } from './endpoint.ts'

/** What serves the whole registry: the tag that was scanned, the lists of forms, who changed what. */
export function registryRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(findTag, ({ params, by }) => find(ctx, by, params.tag))
  endpoints.add(getRegistryOptions, ({ by }) => registryOptions(ctx, by))
  endpoints.add(listHistory, ({ params, query, by }) => list(ctx, by, { ...params, ...query }))
}
