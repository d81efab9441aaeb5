import type { z } from 'zod'
import type { listMembers, listPeople } from '#shared/contracts/people.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { listPage, type Condition } from '../registry/list-page.ts'
import { PERSON_COLUMNS, personOf, type PersonRow } from './person-record.ts'

type PeopleQuery = z.output<typeof listPeople.query>
type MembersQuery = z.output<typeof listMembers.query>

const PEOPLE = {
  columns: PERSON_COLUMNS,
  from: 'member t',
  search: ['t.name', 't.email', 't.phone', 't.call_sign'],
  sorts: {
    name: 'lower(t.name)',
    callSign: 't.call_sign',
    email: 'lower(t.email)',
    licenceExpiresOn: 't.licence_expires_on',
    createdAt: 't.created_at',
  },
}

const MEMBERS = {
  columns: 't.id, t.name, t.call_sign',
  from: 'member t',
  search: ['t.name', 't.call_sign'],
  sorts: { name: 'lower(t.name)' },
}

const REMOVED: Record<PeopleQuery['removed'], Condition[]> = {
  no: [['t.removed_at IS NULL']],
  yes: [['t.removed_at IS NOT NULL']],
  any: [],
}

/** One page of the members with their contacts, for administrators. */
export async function listPeoplePage(tx: GroupTx, query: PeopleQuery) {
  const ofRole: Condition[] = query.role ? [['? = ANY (t.roles)', query.role]] : []
  const conditions = [...REMOVED[query.removed], ...ofRole]
  const { rows, total } = await listPage<PersonRow>(tx, PEOPLE, { query, conditions })
  return { rows: rows.map(personOf), total }
}

/** One page of names and call signs: all that members see of each other. */
export async function listMembersPage(tx: GroupTx, query: MembersQuery) {
  const { rows, total } = await listPage<Pick<PersonRow, 'id' | 'name' | 'call_sign'>>(tx, MEMBERS, {
    query: { ...query, sort: 'name' },
    conditions: REMOVED.no,
  })
  return { rows: rows.map((row) => ({ id: row.id, name: row.name, callSign: row.call_sign })), total }
}
