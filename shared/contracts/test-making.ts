import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { accuracyShape } from './known-for-test.ts'
import { itemNamed } from './readiness-shapes.ts'
import { CREW } from './roles.ts'
import { findingWord } from './words.ts'

const calibration = z.object({ testId: z.string(), performedOn: z.string(), finding: findingWord })

/** What stands behind the figures of a test besides its own record. */
export const readTestMaking = defineEndpoint({
  name: 'read-test-making',
  method: 'get',
  path: '/api/v1/tests/:testId/making',
  summary: 'The accuracy of the instrument of a test, and how its calibration stood on that day',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ testId: id }),
  response: z.object({
    /** The version of the engine that would judge it today. */
    engineVersion: z.string(),
    instrument: z
      .object({
        item: itemNamed,
        /** Of its data sheet as recorded now. */
        accuracy: accuracyShape,
        /** Unit of the fixed part, of full scale and of the resolution. */
        unit: z.string().nullable(),
        calibration: z.object({
          state: z.enum(['in-date', 'confirmed', 'vouched', 'lapsed', 'failed', 'check-failed', 'none']),
          before: calibration.nullable(),
          after: calibration.nullable(),
          untilOn: z.string().nullable(),
          /** The session check that vouches for it or failed. */
          check: calibration.nullable(),
        }),
      })
      .nullable(),
  }),
  problems: ['not-found'],
})

export type TestMaking = z.output<typeof readTestMaking.response>
