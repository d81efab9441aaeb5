import {
  raiseCheck as raiseContract,
  raiseRecall as recallContract,
  withdrawRaisedCheck as withdrawContract,
} from '#shared/contracts/raised-checks.ts'
import {
  decideVerdict as decideContract,
  withdrawDecision as withdrawDecisionContract,
} from '#shared/contracts/verdict-decisions.ts'
import {
  previewWeather as previewContract,
  raiseWeather as weatherContract,
} from '#shared/contracts/weather-events.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { raiseCheck } from '../services/evidence/raise-check.ts'
import { raiseRecall } from '../services/evidence/raise-recall.ts'
import { decideVerdict, withdrawDecision } from '../services/evidence/verdict-decisions.ts'
import { withdrawRaisedCheck } from '../services/evidence/withdraw-raised-check.ts'
import { previewWeather, raiseWeather } from '../services/evidence/weather-event.ts'
import type { EndpointRouter } from './endpoint.ts'

/** What people ask for and decide, beside the tests. */
export function raisedCheckRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(raiseContract, ({ params, body, by }) =>
    inGroup(ctx, by, (tx) => raiseCheck(tx, { checkId: params.checkId, body })),
  )
  endpoints.add(withdrawContract, ({ params, body, by }) =>
    inGroup(ctx, by, (tx) => withdrawRaisedCheck(tx, { checkId: params.checkId, reason: body.reason })),
  )
  endpoints.add(recallContract, ({ params, body, by }) =>
    inGroup(ctx, by, async (tx) => ({ raised: await raiseRecall(tx, { batchId: params.batchId, ...body }) })),
  )
  endpoints.add(previewContract, ({ body, by }) => inGroup(ctx, by, (tx) => previewWeather(tx, body)))
  endpoints.add(weatherContract, ({ body, by }) => inGroup(ctx, by, (tx) => raiseWeather(tx, body)))
  endpoints.add(decideContract, ({ params, body, by }) =>
    inGroup(ctx, by, (tx) => decideVerdict(tx, { ...params, body })),
  )
  endpoints.add(withdrawDecisionContract, ({ params, body, by }) =>
    inGroup(ctx, by, (tx) => withdrawDecision(tx, { ...params, reason: body.reason })),
  )
}
