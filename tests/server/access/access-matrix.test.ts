/**
 * "Who may do what" (promises P12, P14): every operation of the OpenAPI document is tried signed out, as each role in
 * its own group, and as each role that may use it on records of another group. The statuses stand in
 * `access-matrix.txt`: a change of rights is a change of that file, made with `npx vitest --project api -u` and looked
 * at before it is kept.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { ROLES, type Role } from '#shared/contracts/roles.ts'
import { allRows } from '../../support/all-rows.ts'
import { givenRecords, idsOfNothing } from '../../support/group-records.ts'
import {
  isCreation,
  readOperations,
  tryOperation,
  type Answer,
  type Ids,
  type Operation,
} from '../../support/operations.ts'
import { givenItem } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let other: TestGroup
let operations: Operation[]
let own: Ids
let foreign: Ids

beforeAll(async () => {
  app = await startTestApp()
  operations = await readOperations(app)
  group = await app.givenGroup('Ridge Group')
  own = await recordsOf(group)
  other = await app.givenGroup('Valley Group')
  foreign = await recordsOf(other, 1)
}, 120_000)
afterAll(() => app.close())

/** Tags are counted in each group: with `itemsBefore` the other group's item has a tag that ours has not. */
async function recordsOf(of: TestGroup, itemsBefore = 0): Promise<Ids> {
  const by = await app.givenMember(of, { roles: ROLES })
  for (let n = 0; n < itemsBefore; n += 1) await givenItem(by, 'radio')
  return givenRecords(app, { operations, by })
}

const readers = new Map<Role, Promise<TestMember>>()

/** A member of their own for each try at a change: some operations end the session. */
function memberFor(role: Role, { method }: Operation): Promise<TestMember> {
  const known = method === 'GET' ? readers.get(role) : undefined
  const member = known ?? app.givenMember(group, { roles: [role] })
  if (method === 'GET') readers.set(role, member)
  return member
}

async function as(role: Role, operation: Operation, ids: Ids): Promise<Answer> {
  const { cookie } = await memberFor(role, operation)
  return tryOperation(app, operation, { cookie, ids })
}

/** Reads see real records; writes go to none, so that the records stay as they are. */
const idsFor = (operation: Operation) => (operation.method === 'GET' ? own : idsOfNothing())

const allows = ({ access }: Operation, role: Role) => access.roles?.includes(role) ?? false

/** 403 exactly where the rule does not name the role. */
async function statusFor(role: Role, operation: Operation): Promise<number> {
  const { status } = await as(role, operation, idsFor(operation))
  if (operation.access.scope !== 'public')
    expect([operation.name, role, status !== 403]).toEqual([operation.name, role, allows(operation, role)])
  return status
}

const pad = (cells: readonly (string | number)[]) =>
  cells.map((cell, index) => String(cell).padEnd(index === 0 ? 72 : 16)).join(' ')

describe('access', () => {
  it('is as the snapshot says, for every operation and role', { timeout: 300_000 }, async () => {
    const lines = [pad(['operation', 'signed out', ...ROLES]).trimEnd()]
    for (const operation of operations) {
      await app.ctx.db.query('DELETE FROM rate_limit')
      const cells: (string | number)[] = [`${operation.method} ${operation.path}`]
      cells.push((await tryOperation(app, operation, { ids: idsFor(operation) })).status)
      for (const role of ROLES) cells.push(await statusFor(role, operation))
      lines.push(pad(cells).trimEnd())
    }
    await expect(`${lines.join('\n')}\n`).toMatchFileSnapshot('access-matrix.txt')
  })

  it('is refused before anything else about the request is looked at', async () => {
    for (const operation of operations.filter(({ access }) => access.scope !== 'public')) {
      const garbled = {
        ...operation,
        path: operation.path.replace(/\{\w+\}/g, 'x'),
        body: undefined,
        versioned: false,
      }
      expect([operation.name, (await tryOperation(app, garbled, { ids: own })).status]).toEqual([
        operation.name,
        401,
      ])
    }
  })
})

describe('a record of another group', () => {
  it('is answered for as one that does not exist, and stays as it is', { timeout: 300_000 }, async () => {
    const before = await allRows(app, other.id)
    for (const operation of operations.filter(
      ({ params, access }) => params.length > 0 && access.scope !== 'public',
    )) {
      for (const role of ROLES.filter((each) => allows(operation, each))) {
        const nothing = await as(role, operation, idsOfNothing())
        const answer = await as(role, operation, foreign)
        const answers = { operation: operation.name, role, ...answer }
        // A creation under an id that is in use is refused, whoever uses it; under a free one it may be made.
        if (isCreation(operation)) expect(answers.status).toBeGreaterThanOrEqual(400)
        else expect(answers).toEqual({ operation: operation.name, role, ...nothing })
      }
    }
    expect(await allRows(app, other.id)).toEqual(before)
  })
})
