import { listTests, readTest } from '#shared/contracts/read-tests.ts'
import { recordTest as recordTestContract } from '#shared/contracts/record-test.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { listTestsOf } from '../services/evidence/list-tests.ts'
import { recordTest } from '../services/evidence/record-test.ts'
import { readStoredTest } from '../services/evidence/stored-test.ts'
import type { EndpointRouter } from './endpoint.ts'

export function testRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(recordTestContract, ({ params, body, by }) =>
    recordTest(ctx, { by, testId: params.testId, body }),
  )
  endpoints.add(readTest, ({ params, by }) => inGroup(ctx, by, (tx) => readStoredTest(tx, params.testId)))
  endpoints.add(listTests, ({ query, by }) => inGroup(ctx, by, (tx) => listTestsOf(tx, query)))
}
