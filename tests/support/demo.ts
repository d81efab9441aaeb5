/** The demo group of the scenario on a database of the test's own, with the clock frozen at D0. */
import { Member } from '#server/entities/Member.ts'
import { openSession } from '#server/services/sessions.ts'
import { PEOPLE, type PersonKey } from '../../scripts/demo/people.ts'
export { DEMO_SIGN_INS } from '../../scripts/demo/sign-ins.ts'
import { startTestApp, TestMember, type TestApp } from './test-app.ts'
import { createDemoDatabase } from './test-database.ts'

/** 31 October 2026, 18:00 in the group's zone. */
export const D0 = new Date('2026-11-01T01:00:00Z')

/** Loading takes its time on a busy machine; it is done once for all files. */
export const LOADING_MS = 300_000

export class DemoApp {
  constructor(
    readonly app: TestApp,
    readonly groupId: string,
    readonly close: () => Promise<void>,
  ) {}

  /** A browser in which this member is signed in. */
  as(person: PersonKey): Promise<TestMember> {
    return this.app.inGroup({ id: this.groupId }, async (tx) => {
      const row = await tx.repository(Member).findOneBy({ name: PEOPLE[person].name })
      if (!row) throw new Error(`The demo has no ${person}`)
      const session = { memberId: row.id, ownDevice: true, device: 'Test browser', address: '127.0.0.1' }
      return new TestMember(this.app.server, row, await openSession(tx, session))
    })
  }

  /** Rows of any table, as the group sees them. */
  rows<Row extends object>(text: string, values: readonly unknown[] = []): Promise<Row[]> {
    return this.app.inGroup({ id: this.groupId }, (tx) => tx.manager.query<Row[]>(text, [...values]))
  }

  /** Id of a kit or an item that is in use. */
  async idOf(designation: string): Promise<string> {
    const [row] = await this.rows<{ id: string }>(
      `SELECT id FROM kit WHERE designation = $1
        UNION ALL SELECT id FROM item WHERE designation = $1 AND retired_at IS NULL`,
      [designation],
    )
    if (!row) throw new Error(`There is no ${designation}`)
    return row.id
  }
}

export async function startDemoApp(asOf = D0, now = asOf): Promise<DemoApp> {
  const database = await createDemoDatabase(asOf)
  const app = await startTestApp({ databaseUrl: database.appUrl, now: now.toISOString() })
  const [group] = await app.ctx.db.query<{ id: string }[]>('SELECT id FROM list_groups()')
  return new DemoApp(app, group!.id, async () => {
    await app.close()
    await database.drop()
  })
}
