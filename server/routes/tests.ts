import { readItemResults as resultsContract } from '#shared/contracts/item-results.ts'
import { listTests, readTest } from '#shared/contracts/read-tests.ts'
import { recordTest as recordTestContract } from '#shared/contracts/record-test.ts'
import { readTestForm as formContract } from '#shared/contracts/test-form.ts'
import { readTestMaking as makingContract } from '#shared/contracts/test-making.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { readItemResults } from '../services/evidence/item-results.ts'
import { listTestsOf } from '../services/evidence/list-tests.ts'
import { readTestForm } from '../services/evidence/read-test-form.ts'
import { recordTest } from '../services/evidence/record-test.ts'
import { readStoredTest } from '../services/evidence/stored-test.ts'
import { readTestMaking } from '../services/evidence/test-making.ts'
import type { EndpointRouter } from './endpoint.ts'

export function testRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(recordTestContract, ({ params, body, by }) =>
    recordTest(ctx, { by, testId: params.testId, body }),
  )
  endpoints.add(readTest, ({ params, by }) => inGroup(ctx, by, (tx) => readStoredTest(tx, params.testId)))
  endpoints.add(makingContract, ({ params, by }) =>
    inGroup(ctx, by, (tx) => readTestMaking(tx, params.testId)),
  )
  endpoints.add(listTests, ({ query, by }) => inGroup(ctx, by, (tx) => listTestsOf(tx, query)))
  endpoints.add(resultsContract, ({ params, query, by }) =>
    inGroup(ctx, by, (tx) => readItemResults(tx, { itemId: params.itemId, procedures: query.procedure })),
  )
  endpoints.add(formContract, ({ params, query, by }) =>
    inGroup(ctx, by, (tx) => readTestForm(tx, { ...params, ...query })),
  )
}
