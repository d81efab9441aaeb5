import { askWhatIf as askContract, readAdvice as readContract } from '#shared/contracts/advice.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { askWhatIf } from '../services/advice/ask-what-if.ts'
import { readAdvice } from '../services/advice/read-advice.ts'
import type { EndpointRouter } from './endpoint.ts'

export function adviceRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(readContract, ({ by }) => readAdvice(ctx, by))
  endpoints.add(askContract, ({ body, by }) => inGroup(ctx, by, (tx) => askWhatIf(tx, body)))
}
