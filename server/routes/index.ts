import type { AppContext } from '../context.ts'
import { adviceRoutes } from './advice.ts'
import { attachmentRoutes } from './attachments.ts'
import { batchRoutes } from './batches.ts'
import { boardRoutes } from './board.ts'
import { buildSheetRoutes } from './build-sheets.ts'
import { buildRoutes } from './builds.ts'
import { consumableRoutes, stockRoutes } from './consumables.ts'
import type { EndpointRouter } from './endpoint.ts'
import { healthRoutes } from './health.ts'
import { itemRoutes } from './items.ts'
import { kitKindRoutes } from './kit-kinds.ts'
import { kitRoutes } from './kits.ts'
import { liveRoutes } from './live.ts'
import { moveRoutes } from './moves.ts'
import { oneTimeLinkRoutes } from './one-time-links.ts'
import { peopleRoutes } from './people.ts'
import { placeRoutes } from './places.ts'
import { policyRoutes } from './policies.ts'
import { profileRoutes } from './profile.ts'
import { raisedCheckRoutes } from './raised-checks.ts'
import { readinessRoutes } from './readiness.ts'
import { registryRoutes } from './registry.ts'
import { reminderRoutes } from './reminders.ts'
import { sessionRoutes } from './sessions.ts'
import { testRoutes } from './tests.ts'
import { tagSheetRoutes } from './tag-sheets.ts'

/** Every group of endpoints, in the order of the OpenAPI document. */
const routes: readonly ((endpoints: EndpointRouter, ctx: AppContext) => void)[] = [
  healthRoutes,
  sessionRoutes,
  oneTimeLinkRoutes,
  profileRoutes,
  peopleRoutes,
  placeRoutes,
  kitKindRoutes,
  kitRoutes,
  itemRoutes,
  moveRoutes,
  buildSheetRoutes,
  batchRoutes,
  buildRoutes,
  consumableRoutes,
  stockRoutes,
  registryRoutes,
  tagSheetRoutes,
  testRoutes,
  attachmentRoutes,
  boardRoutes,
  readinessRoutes,
  adviceRoutes,
  policyRoutes,
  raisedCheckRoutes,
  liveRoutes,
  reminderRoutes,
]

export function addRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  for (const add of routes) add(endpoints, ctx)
}
