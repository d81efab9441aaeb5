import type { AppContext } from '../context.ts'
import type { EndpointRouter } from './endpoint.ts'
import { healthRoutes } from './health.ts'

/** Every group of endpoints, in the order of the OpenAPI document. */
const routes: readonly ((endpoints: EndpointRouter, ctx: AppContext) => void)[] = [healthRoutes]

export function addRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  for (const add of routes) add(endpoints, ctx)
}
