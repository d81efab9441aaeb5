import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, page, pageQuery } from './fields.ts'
import { CREW } from './roles.ts'
import { storedTest, testSummary } from './test-shapes.ts'
import { findingWord, listOf, procedure } from './words.ts'

export const readTest = defineEndpoint({
  name: 'read-test',
  method: 'get',
  path: '/api/v1/tests/:testId',
  summary: 'One test with inputs, results, findings and the rule it was judged by',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ testId: id }),
  response: storedTest,
})

/** Newest first unless asked. With `kitId`: tests of the kit and of the items that are in it now. */
export const listTests = defineEndpoint({
  name: 'list-tests',
  method: 'get',
  path: '/api/v1/tests',
  summary: 'Tests, of an item, of a kit or of the whole group',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    /** Newest first is the order people look for. */
    descending: z.stringbool().default(true),
    itemId: id.optional(),
    kitId: id.optional(),
    instrumentId: id.optional(),
    procedure: listOf(procedure).optional(),
    finding: listOf(findingWord).optional(),
    /** Corrected tests are left out unless asked for. */
    superseded: z.stringbool().default(false),
  }),
  response: page(testSummary),
})
