/** The query filter alone keeps the files of groups apart (promises P13, P16). */
import { DataSource } from 'typeorm'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { systemActor } from '#server/caller.ts'
import { entities } from '#server/entities/index.ts'
import { inGroup, type GroupTx } from '#server/group-transaction.ts'
import { readAttachmentOf, readContent } from '#server/services/attachments/attachment-rows.ts'
import { fileSources, filesOfTest } from '#server/services/evidence/named-files.ts'
import { inspection, recorded } from '../../support/evidence.ts'
import { givenItem } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { uploaded } from '../../support/uploads.ts'

let app: TestApp
let owner: DataSource
let member: TestMember
let stranger: TestMember

beforeAll(async () => {
  app = await startTestApp()
  owner = new DataSource({ type: 'postgres', url: app.database?.ownerUrl, entities })
  await owner.initialize()
  member = await app.givenMember(await app.givenGroup('Ridge Group'), { roles: ['quartermaster'] })
  stranger = await app.givenMember(await app.givenGroup('Valley Group'))
})
afterAll(async () => {
  await owner.destroy()
  await app.close()
})

/** In a group's transaction, by a role that row-level security does not bind. */
const unbound = <T>({ groupId }: TestMember, work: (tx: GroupTx) => Promise<T>) =>
  inGroup({ ...app.ctx, db: owner }, { groupId, actor: systemActor('test') }, work)

it('shows a file to its own group alone where row-level security lets everything through', async () => {
  const id = await uploaded(app, member, { kind: 'csv', bytes: 'time,temperature\n0,21.5\n' })
  const radio = await givenItem(member, 'radio')
  const test = await recorded(member, {
    ...inspection(radio.id, app.clock.now().toISOString()),
    attachmentIds: [id],
  })
  const seen = (by: TestMember) =>
    unbound(by, async (tx) => [
      await readAttachmentOf(tx, id).then(
        () => 1,
        () => 0,
      ),
      await readContent(tx, id).then(
        () => 1,
        () => 0,
      ),
      Object.keys(await fileSources(tx, [id])).length,
      (await filesOfTest(tx, test.id)).length,
    ])
  expect(await seen(member)).toEqual([1, 1, 1, 1])
  expect(await seen(stranger)).toEqual([0, 0, 0, 0])
})
