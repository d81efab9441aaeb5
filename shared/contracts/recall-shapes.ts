import { z } from 'zod'
import { RECALL_PROCEDURES } from '#shared/engine/builds/matching.ts'
import { answeredAt, band, condition, findingWord } from './words.ts'

/** How recalls and the proposals of them look in answers. */

export const recallProcedure = z.enum(RECALL_PROCEDURES)

/** A unit of a batch, and the kit that would go without proof for it. */
export const batchUnit = z.object({
  id: z.string(),
  designation: z.string(),
  condition,
  kit: z.object({ id: z.string(), designation: z.string() }).nullable(),
  /** Where it is: its own place, or that of its kit. */
  place: z.string().nullable(),
})

/** A failed or departing unit: its siblings may have the same fault, and nothing asks for their test yet. */
export const recallProposal = z.object({
  batch: z.object({ id: z.string(), name: z.string() }),
  procedure: recallProcedure,
  band,
  causes: z.array(
    z.object({
      unit: z.object({ id: z.string(), designation: z.string() }),
      kind: z.enum(['failed', 'departs']),
      testId: z.string(),
      /** Without the unit's name: "reached 85 °C after 8.2 min at 50 W". */
      text: z.string(),
    }),
  ),
  siblings: z.array(batchUnit),
})

export const batchRecall = z.object({
  procedure: recallProcedure,
  /** Null: on every band. */
  band: band.nullable(),
  reason: z.string(),
  raisedAt: answeredAt,
  raisedBy: z.string(),
  dueOn: z.string(),
  units: z.array(
    batchUnit.extend({
      state: z.enum(['waiting', 'tested', 'taken-back', 'out']),
      testId: z.string().nullable(),
      finding: findingWord.nullable(),
    }),
  ),
  /** Units whose test is still to come; at 0 the recall has ended by itself. */
  waiting: z.int(),
})

export type RecallProposal = z.output<typeof recallProposal>
export type BatchRecall = z.output<typeof batchRecall>
