import type { RecordTestBody } from '#shared/contracts/record-test.ts'
import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { judgeTest } from '#shared/engine/procedures/judge-test.ts'
import type { Judgement } from '#shared/engine/procedures/judgement.ts'
import { policyAt, ruleFor } from '#shared/engine/readiness/rules-in-force.ts'
import type { Caller } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { AppError } from '../../errors.ts'
import { inGroup, localDay, type GroupTx } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'
import { lockKits } from '../lock-kits.ts'
import { rewriteAndCompare } from '../rewrite-readiness.ts'
import { affectedKits } from './affected-kits.ts'
import { auditTest } from './audit-test.ts'
import { contentHash, insertTest, type TestToInsert } from './insert-test.ts'
import { accuracyOf, knownForTest } from './known-for-test.ts'
import { readStoredTest, storedHash } from './stored-test.ts'
import { applyConsequences } from './test-consequences.ts'
import { insertEffects } from './test-effects.ts'
import {
  checkSuperseded,
  readInstrument,
  readOperator,
  readSubject,
  type TestSubject,
} from './test-subject.ts'

interface NewTest {
  readonly by: Pick<Caller, 'groupId' | 'memberId' | 'actor'>
  readonly testId: string
  readonly body: RecordTestBody
}

/**
 * Stores a test with its results, its findings and what it did to its kits, whole or not at all. A saved test is never
 * rewritten: a resend gets the first answer again, and other content under the same id is refused.
 */
export function recordTest(ctx: AppContext, { by, testId, body }: NewTest): Promise<StoredTest> {
  return inGroup(ctx, { groupId: by.groupId, actor: by.actor }, (tx) =>
    recordTestIn(tx, { testId, body, operatorId: body.operatorId ?? by.memberId }),
  )
}

interface Recording {
  readonly testId: string
  readonly body: RecordTestBody
  readonly operatorId: string
}

/** The same inside a transaction at hand. */
export async function recordTestIn(tx: GroupTx, recording: Recording): Promise<StoredTest> {
  const { testId, body, operatorId } = recording
  const hash = contentHash(body, operatorId)
  const known = await storedHash(tx, testId)
  if (known) return sameAgain(tx, testId, { known, sent: hash })
  const { subject, test } = await judge(tx, recording, hash)
  const kitIds = await affectedKits(tx, subject, body.procedure)
  const [, isNew] = await Promise.all([lockKits(tx, kitIds), insertTest(tx, test)])
  if (!isNew) return sameAgain(tx, testId, { known: await storedHash(tx, testId), sent: hash })
  await applyConsequences(tx, test)
  const changes = await rewriteAndCompare(tx, kitIds)
  await Promise.all([insertEffects(tx, testId, changes), auditTest(tx, { subject, test })])
  return readStoredTest(tx, testId)
}

async function sameAgain(
  tx: GroupTx,
  testId: string,
  { known, sent }: { known: Buffer | null; sent: Buffer },
): Promise<StoredTest> {
  if (known?.equals(sent)) return readStoredTest(tx, testId)
  throw new AppError(
    'id-taken',
    'Begin the test anew on the device that sent it; what was typed is still there.',
  )
}

async function judge(
  tx: GroupTx,
  { testId, body, operatorId }: Recording,
  hash: Buffer,
): Promise<{ subject: TestSubject; test: TestToInsert }> {
  const [subject, instrument, , , policies, zone] = await Promise.all([
    readSubject(tx, body),
    readInstrument(tx, body),
    readOperator(tx, operatorId),
    checkSuperseded(tx, testId, body),
    policiesOrFirst(tx),
    tx.zone(),
  ])
  const claimedAt = new Date(body.performedAt)
  // A test cannot count before it was received, whatever the device's clock said (promise P7).
  const performedAt = claimedAt < tx.now ? claimedAt : tx.now
  const performedOn = localDay(performedAt, zone)
  const policy = policyAt({ policies }, performedAt.getTime())
  if (!policy) throw new Error('A group without a policy')
  const rule = ruleFor(policy, subject, body.procedure, performedOn)
  const accuracy = accuracyOf(instrument)
  const judgement = judged(body, await knownForTest(tx, { body, performedAt, subject, rule, accuracy }))
  return {
    subject,
    test: {
      id: testId,
      body,
      operatorId,
      performedOn,
      claimedAt: claimedAt > tx.now ? claimedAt : null,
      performedAt,
      policyId: policy.id,
      ruleId: rule?.id ?? null,
      judgement,
      contentHash: hash,
    },
  }
}

function judged(body: RecordTestBody, known: Awaited<ReturnType<typeof knownForTest>>): Judgement {
  const judgement = judgeTest(body, known)
  if (!isFailure(judgement)) return judgement
  const { field, line, message } = judgement
  const pointer = ['#/inputs', field, line === undefined ? undefined : line - 1].filter(
    (part) => part !== undefined,
  )
  throw new AppError('request-invalid', 'The test cannot be judged as it stands. Nothing was saved.', {
    errors: [{ pointer: pointer.join('/'), detail: message }],
  })
}
