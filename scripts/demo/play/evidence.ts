import type { z } from 'zod'
import { raiseCheck as raiseContract } from '#shared/contracts/raised-checks.ts'
import { recordTestBody } from '#shared/contracts/record-test.ts'
import { inGroup } from '#server/group-transaction.ts'
import { raiseCheck } from '#server/services/evidence/raise-check.ts'
import { raiseRecall } from '#server/services/evidence/raise-recall.ts'
import { recordTest } from '#server/services/evidence/record-test.ts'
import { withdrawRaisedCheck } from '#server/services/evidence/withdraw-raised-check.ts'
import type { AskForCheck, Deed } from '../deeds.ts'
import { testName, type CountTest, type DemoTest } from '../demo-test.ts'
import { KIT_KINDS, type PlanLine } from '../kit-kinds.ts'
import { kitOf } from '../kits.ts'
import { memberId } from './people.ts'
import { named } from './registry.ts'
import type { Stage } from './stage.ts'

export async function test(stage: Stage, { test: performed }: { test: DemoTest }): Promise<void> {
  const { ctx, by, ids, calendar } = stage
  const testId = ids.make(`test ${testName(performed)}`, calendar.at(performed.performed))
  await recordTest(ctx, { by, testId, body: recordTestBody.parse(bodyOf(stage, performed)) })
}

type Input = z.input<typeof recordTestBody>

function bodyOf(stage: Stage, performed: DemoTest): Input {
  const { ids } = stage
  const common = commonOf(stage, performed)
  if (performed.procedure === 'count') {
    return {
      procedure: 'count',
      kitId: ids.of(performed.subject),
      ...common,
      inputs: countInputs(stage, performed),
    }
  }
  const { procedure } = performed
  const partner = performed.procedure === 'pair-loss' && { partnerId: ids.of(performed.partner) }
  const inputs = { ...performed.inputs, ...partner }
  return { procedure, itemId: ids.of(performed.subject), ...common, inputs } as Input
}

function commonOf(
  stage: Stage,
  { performed, method, instrument, instrumentNote, operator, ...test }: DemoTest,
) {
  const { ids, calendar } = stage
  return {
    performedAt: calendar.instant(performed),
    method,
    ...(instrument !== undefined && { instrumentId: ids.of(instrument) }),
    ...(instrumentNote !== undefined && { instrumentNote }),
    ...(operator !== undefined && { operatorId: memberId(stage, operator) }),
    ...(test.notes !== undefined && { notes: test.notes }),
    ...(test.supersedes && {
      supersedes: { testId: ids.of(`test ${test.supersedes.test}`), reason: test.supersedes.reason },
    }),
  }
}

function countInputs({ ids }: Stage, { subject, inputs }: CountTest) {
  const { kind } = kitOf(subject)
  const { plan }: { plan: readonly PlanLine[] } = KIT_KINDS[kind]
  return {
    positions: plan.map(({ name, quantity }) => ({
      positionId: ids.of(named.position(kind, name)),
      found: inputs.short[name]?.found ?? quantity,
      missingItemIds: (inputs.short[name]?.missing ?? []).map((item) => ids.of(item)),
    })),
    extraItemIds: inputs.extra.map((item) => ids.of(item)),
    sealFound: inputs.sealFound,
    sealApplied: inputs.sealApplied,
  }
}

export async function askForCheck({ ctx, by, ids, now, calendar }: Stage, deed: AskForCheck): Promise<void> {
  const { name, subject, procedure, band, cause, reason, doubtsEarlier, dueOn } = deed
  const subjectId = subject.startsWith('K-') ? { kitId: ids.of(subject) } : { itemId: ids.of(subject) }
  const said = { procedure, band, cause, reason, doubtsEarlier, dueOn: calendar.day(dueOn) }
  const body = raiseContract.body.parse({ ...subjectId, ...said })
  await inGroup(ctx, by, (tx) => raiseCheck(tx, { checkId: ids.make(`check ${name}`, now), body }))
}

export async function takeBackCheck(
  { ctx, by, ids }: Stage,
  { name, reason }: { name: string; reason: string },
): Promise<void> {
  await inGroup(ctx, by, (tx) => withdrawRaisedCheck(tx, { checkId: ids.of(`check ${name}`), reason }))
}

export async function recall(
  { ctx, by, ids, calendar }: Stage,
  { batch, band, reason, dueOn }: Extract<Deed, { do: 'recall' }>,
): Promise<void> {
  const batchId = ids.of(named.batch(batch))
  const asked = { batchId, procedure: 'heat-test', band, reason, dueOn: calendar.day(dueOn) } as const
  await inGroup(ctx, by, (tx) => raiseRecall(tx, asked))
}
