/** The query filter alone keeps the evidence of groups apart, by whatever id it is asked for (promises P13, P16). */
import { v7 as uuidv7 } from 'uuid'
import { DataSource } from 'typeorm'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { systemActor } from '#server/caller.ts'
import { entities } from '#server/entities/index.ts'
import { inGroup, type GroupTx } from '#server/group-transaction.ts'
import { readAttachmentOf, readContent } from '#server/services/attachments/attachment-rows.ts'
import { fileSources, filesOfTest } from '#server/services/evidence/named-files.ts'
import { readRaisedChecks } from '#server/services/evidence/raised-check-rows.ts'
import { readStoredTest, storedHash } from '#server/services/evidence/stored-test.ts'
import { readItemSubject, readKitSubject, readOperator } from '#server/services/evidence/test-subject.ts'
import { readCurrentPolicy, readPolicy } from '#server/services/policy/read-policies.ts'
import { readKitFace } from '#server/services/readiness/kit-face.ts'
import { inspection, recorded } from '../../support/evidence.ts'
import { givenItem, givenKit, givenKitKind, type Item, type Kit } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { uploaded } from '../../support/uploads.ts'

let app: TestApp
let owner: DataSource
let member: TestMember
let stranger: TestMember
let radio: Item
let kit: Kit

beforeAll(async () => {
  app = await startTestApp()
  owner = new DataSource({ type: 'postgres', url: app.database?.ownerUrl, entities })
  await owner.initialize()
  member = await app.givenMember(await app.givenGroup('Ridge Group'), { roles: ['quartermaster'] })
  stranger = await app.givenMember(await app.givenGroup('Valley Group'))
  radio = await givenItem(member, 'radio')
  kit = await givenKit(member, await givenKitKind(member))
})
afterAll(async () => {
  await owner.destroy()
  await app.close()
})

/** How many of these are found in a member's group by a role that row-level security does not bind. */
function seen(by: TestMember, reads: readonly ((tx: GroupTx) => Promise<unknown>)[]): Promise<boolean[]> {
  const scope = { groupId: by.groupId, actor: systemActor('test') }
  return inGroup({ ...app.ctx, db: owner }, scope, async (tx) => {
    const found: boolean[] = []
    for (const read of reads) found.push(isFound(await read(tx).catch(() => null)))
    return found
  })
}

const isFound = (answer: unknown) =>
  answer !== null && (typeof answer !== 'object' || Buffer.isBuffer(answer) || Object.keys(answer).length > 0)

async function expectOwnOnly(reads: readonly ((tx: GroupTx) => Promise<unknown>)[]): Promise<void> {
  expect(await seen(member, reads)).toEqual(reads.map(() => true))
  expect(await seen(stranger, reads)).toEqual(reads.map(() => false))
}

it('finds a file, and the files of a test, in the own group only', async () => {
  const id = await uploaded(app, member, { kind: 'csv', bytes: 'time,temperature\n0,21.5\n' })
  const body = { ...inspection(radio.id, app.clock.now().toISOString()), attachmentIds: [id] }
  const test = await recorded(member, body)
  await expectOwnOnly([
    (tx) => readAttachmentOf(tx, id),
    (tx) => readContent(tx, id),
    (tx) => fileSources(tx, [id]),
    (tx) => filesOfTest(tx, test.id),
  ])
})

it('finds what a test is about, who made it and the test itself in the own group only', async () => {
  const test = await recorded(member, inspection(radio.id, app.clock.now().toISOString()))
  await expectOwnOnly([
    (tx) => readItemSubject(tx, radio.id),
    (tx) => readKitSubject(tx, kit.id),
    (tx) => readOperator(tx, member.memberId),
    (tx) => readStoredTest(tx, test.id),
    (tx) => storedHash(tx, test.id),
    (tx) => readKitFace(tx, kit.id),
  ])
})

it('finds a raised check and a policy in the own group only', async () => {
  const checkId = uuidv7()
  const { body: check } = await member.put(`/api/v1/raised-checks/${checkId}`, {
    itemId: radio.id,
    procedure: 'inspection',
    cause: 'drop',
    reason: 'It fell',
    dueOn: '2027-01-01',
  })
  const policy = await app.inGroup({ id: member.groupId }, readCurrentPolicy)
  expect([check.id, policy.id]).toEqual([checkId, expect.any(String)])
  await expectOwnOnly([(tx) => readRaisedChecks(tx, [checkId]), (tx) => readPolicy(tx, policy.id)])
})
