import { readAdvice as readContract } from '#shared/contracts/advice.ts'
import {
  askWhatIf as askContract,
  doWhatIf as doContract,
  listWhatIfs as listContract,
} from '#shared/contracts/what-if.ts'
import { readSinglePoints as pointsContract } from '#shared/contracts/single-points.ts'
import { planWorkParty as partyContract } from '#shared/contracts/work-party.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { askWhatIf } from '../services/advice/ask-what-if.ts'
import { doWhatIf } from '../services/advice/do-what-if.ts'
import { planWorkParty } from '../services/advice/plan-work-party.ts'
import { readAdvice } from '../services/advice/read-advice.ts'
import { readSinglePoints } from '../services/advice/read-single-points.ts'
import { listWhatIfs } from '../services/advice/what-if-rows.ts'
import type { EndpointRouter } from './endpoint.ts'

export function adviceRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(readContract, ({ by }) => readAdvice(ctx, by))
  endpoints.add(pointsContract, ({ by }) => inGroup(ctx, by, readSinglePoints))
  endpoints.add(partyContract, ({ body, by }) => planWorkParty(ctx, by, body))
  endpoints.add(askContract, ({ body, by }) => inGroup(ctx, by, (tx) => askWhatIf(tx, body)))
  endpoints.add(listContract, ({ by }) => inGroup(ctx, by, listWhatIfs))
  endpoints.add(doContract, ({ params, body, by }) =>
    inGroup(ctx, by, (tx) => doWhatIf(tx, { whatIfId: params.whatIfId, body })),
  )
}
