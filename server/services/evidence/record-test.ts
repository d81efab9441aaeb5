import type { RecordTestBody } from '#shared/contracts/record-test.ts'
import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { isFailure, type Failure } from '#shared/engine/outcome.ts'
import { filesWanted, judgePerformance } from '#shared/engine/procedures/judge-performance.ts'
import { INPUT_ROWS } from '#shared/engine/procedures/input-rows.ts'
import type { Judgement } from '#shared/engine/procedures/judgement.ts'
import type { KnownForTest } from '#shared/engine/procedures/performance.ts'
import { filesNamed, type FileSources } from '#shared/engine/procedures/test-files.ts'
import { policyAt } from '#shared/engine/readiness/rules-in-force.ts'
import type { Caller } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { AppError } from '../../errors.ts'
import { inGroup, localDay, type GroupTx } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'
import { lockKits } from '../lock-kits.ts'
import { prepareRewriting } from '../rewrite-readiness.ts'
import { affectedKits } from './affected-kits.ts'
import { auditTest } from './audit-test.ts'
import { contentHash, insertTest, type TestToInsert } from './insert-test.ts'
import { accuracyOf, knownForTest } from './known-for-test.ts'
import { keptKnown } from './kept-known.ts'
import { fileSources, linkFiles, namedFiles } from './named-files.ts'
import { ruleOfTest } from './rule-of-test.ts'
import { readStoredTest, storedHash } from './stored-test.ts'
import { testHistory } from './test-history.ts'
import { applyConsequences, hasConsequences } from './test-consequences.ts'
import { insertEffects } from './test-effects.ts'
import {
  checkPartner,
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

/**
 * The same inside a transaction at hand. What does not wait for another answer is sent together: on a busy kit every
 * round trip is one more that all others wait for.
 */
export async function recordTestIn(tx: GroupTx, recording: Recording): Promise<StoredTest> {
  const { testId, body, operatorId } = recording
  const sent = contentHash(body, operatorId)
  const [hash, judged] = await Promise.allSettled([storedHash(tx, testId), judge(tx, recording, sent)])
  const known = valueOf(hash)
  // A resend gets its answer also when what it names has changed meanwhile.
  if (known) return sameAgain(tx, testId, { known, sent })
  const { subject, test } = valueOf(judged)
  const kitIds = await affectedKits(tx, subject, body.procedure)
  const inserting = Promise.all([lockKits(tx, kitIds), insertTest(tx, test)])
  if (hasConsequences(body)) {
    const [, isNew] = await inserting
    if (isNew) await applyConsequences(tx, test)
  }
  const [[, isNew], rewriting] = await Promise.all([inserting, prepareRewriting(tx, kitIds)])
  if (!isNew) return sameAgain(tx, testId, { known: await storedHash(tx, testId), sent })
  const [, , , , stored] = await Promise.all([
    linkFiles(tx, testId, test.files),
    insertEffects(tx, testId, rewriting.changes),
    auditTest(tx, { subject, test }),
    rewriting.write(),
    readStoredTest(tx, testId),
  ])
  return stored
}

function valueOf<T>(settled: PromiseSettledResult<T>): T {
  if (settled.status === 'rejected') throw settled.reason
  return settled.value
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
  const claimedAt = new Date(body.performedAt)
  // A test cannot count before it was received, whatever the device's clock said (promise P7).
  const performedAt = claimedAt < tx.now ? claimedAt : tx.now
  const [subject, instrument, history, files, , , , policies, zone] = await Promise.all([
    readSubject(tx, body),
    readInstrument(tx, body),
    testHistory(tx, historyOf(body, performedAt)),
    namedFiles(tx, body),
    readOperator(tx, operatorId),
    checkSuperseded(tx, testId, body),
    checkPartner(tx, body),
    policiesOrFirst(tx),
    tx.zone(),
  ])
  const performedOn = localDay(performedAt, zone)
  const policy = policyAt({ policies }, performedAt.getTime())
  if (!policy) throw new Error('A group without a policy')
  const rule = ruleOfTest(policy, {
    subject,
    procedure: body.procedure,
    on: performedOn,
    band: body.procedure === 'heat-test' ? body.inputs.band : null,
  })
  const accuracy = accuracyOf(instrument)
  const known = knownForTest({ subject, history, policy, rule, accuracy })
  const judgement = judgementOf(body, { ...files.sources, ...(await baselineFile(tx, body, known)) }, known)
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
      known: keptKnown(body.procedure, known),
      files: files.links,
      contentHash: hash,
    },
  }
}

function historyOf(body: RecordTestBody, performedAt: Date): Parameters<typeof testHistory>[1] {
  return {
    procedure: body.procedure,
    subjectId: 'kitId' in body ? body.kitId : body.itemId,
    performedAt,
    corrects: body.supersedes?.testId ?? null,
  }
}

/** Only a sweep by file is compared with another one point by point. */
async function baselineFile(tx: GroupTx, body: RecordTestBody, known: KnownForTest): Promise<FileSources> {
  const named = filesNamed(body).map(({ id }) => id)
  if (named.length === 0) return {}
  return fileSources(
    tx,
    filesWanted(body, known).filter((id) => !named.includes(id)),
  )
}

function judgementOf(body: RecordTestBody, sources: FileSources, known: KnownForTest): Judgement {
  const judgement = judgePerformance(body, sources, known)
  if (!isFailure(judgement)) return judgement
  throw new AppError('request-invalid', 'The test cannot be judged as it stands. Nothing was saved.', {
    errors: [{ pointer: pointerTo(body.procedure, judgement), detail: judgement.message }],
  })
}

function pointerTo(procedure: RecordTestBody['procedure'], { field, line }: Failure): string {
  const rows = INPUT_ROWS[procedure]
  const row = line === undefined || rows === undefined ? [] : [rows, line - 1]
  return ['#/inputs', ...row, ...(field === undefined ? [] : [field])].join('/')
}
