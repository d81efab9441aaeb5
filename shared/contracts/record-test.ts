import { z } from 'zod'
import { MAX_ATTACHMENTS } from './attachments.ts'
import { defineEndpoint } from './endpoint.ts'
import { id, instant, line, newId, text } from './fields.ts'
import { CREW } from './roles.ts'
import {
  antennaSweepInputs,
  batteryCapacityInputs,
  feedlineLossInputs,
  heatTestInputs,
  pairLossInputs,
  radioCheckInputs,
} from './test-inputs.ts'
import {
  bootAndUpdateInputs,
  calibrationInputs,
  countInputs,
  inspectionInputs,
  onAirCheckInputs,
  sessionCheckInputs,
} from './check-inputs.ts'
import { openShortLoadInputs } from './test-inputs-by-file.ts'
import { storedTest } from './test-shapes.ts'

/** What every test says. Who recorded it comes from the session; the operator may be another member. */
const common = {
  performedAt: instant,
  method: line(120, 1),
  /** Further instruments and fixtures in words: "2450 ohm fixture FIX-23, probe under the winding". */
  instrumentNote: line(200).default(''),
  /** The member who did the work; absent: the caller. */
  operatorId: id.optional(),
  notes: text(2000).default(''),
  /** Corrects an earlier test of the same procedure and subject. */
  supersedes: z.strictObject({ testId: id, reason: text(500, 1) }).optional(),
  /** Photos, certificates and raw logs that belong to the test; files that it is read from stand in its inputs. */
  attachmentIds: z
    .array(id)
    .max(MAX_ATTACHMENTS)
    .refine((ids) => new Set(ids).size === ids.length, 'Name each file once.')
    .optional(),
}

const measured = { ...common, instrumentId: id }
const judged = { ...common, instrumentId: id.optional() }

export const recordTestBody = z.discriminatedUnion('procedure', [
  z.strictObject({ procedure: z.literal('heat-test'), itemId: id, ...measured, inputs: heatTestInputs }),
  z.strictObject({ procedure: z.literal('pair-loss'), itemId: id, ...measured, inputs: pairLossInputs }),
  z.strictObject({
    procedure: z.literal('open-short-load'),
    itemId: id,
    ...measured,
    inputs: openShortLoadInputs,
  }),
  z.strictObject({
    procedure: z.literal('antenna-sweep'),
    itemId: id,
    ...measured,
    inputs: antennaSweepInputs,
  }),
  z.strictObject({
    procedure: z.literal('feedline-loss'),
    itemId: id,
    ...measured,
    inputs: feedlineLossInputs,
  }),
  z.strictObject({
    procedure: z.literal('battery-capacity'),
    itemId: id,
    ...measured,
    inputs: batteryCapacityInputs,
  }),
  z.strictObject({ procedure: z.literal('radio-check'), itemId: id, ...measured, inputs: radioCheckInputs }),
  z.strictObject({ procedure: z.literal('inspection'), itemId: id, ...judged, inputs: inspectionInputs }),
  z.strictObject({ procedure: z.literal('count'), kitId: id, ...judged, inputs: countInputs }),
  z.strictObject({ procedure: z.literal('calibration'), itemId: id, ...judged, inputs: calibrationInputs }),
  z.strictObject({
    procedure: z.literal('session-check'),
    itemId: id,
    ...judged,
    inputs: sessionCheckInputs,
  }),
  z.strictObject({
    procedure: z.literal('boot-and-update'),
    itemId: id,
    ...judged,
    inputs: bootAndUpdateInputs,
  }),
  z.strictObject({ procedure: z.literal('on-air-check'), kitId: id, ...judged, inputs: onAirCheckInputs }),
])

/**
 * The phone makes the id, so sending twice records once: the same content again is the same success, also when
 * retries race; other content under a used id is `id-taken`.
 */
export const recordTest = defineEndpoint({
  name: 'record-test',
  method: 'put',
  path: '/api/v1/tests/:testId',
  summary: 'Record a test; the answer says its finding and what it did to the kit',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ testId: newId }),
  body: recordTestBody,
  response: storedTest,
  problems: ['request-invalid', 'id-taken', 'already-superseded', 'state-conflict'],
})

export type RecordTestBody = z.output<typeof recordTestBody>
export type RecordTestInput = z.input<typeof recordTestBody>
/** The procedures that can be recorded. */
export type RecordableProcedure = RecordTestBody['procedure']
