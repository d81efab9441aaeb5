import type { RecordTestBody } from '#shared/contracts/record-test.ts'
import { canBeTested, SUBJECTS } from '#shared/engine/procedures/subjects.ts'
import type { ItemFacts } from '#shared/engine/readiness/types.ts'
import { withArticle } from '#shared/engine/readiness/words.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import { AppError, invalidField, notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { itemFacts } from '../item-facts.ts'

/** What a test is about. */
export interface TestSubject {
  readonly type: 'item' | 'kit'
  readonly id: string
  readonly designation: string
  readonly category: Category | 'kit'
  readonly facts: ItemFacts
  readonly details: Readonly<Record<string, unknown>>
  /** The kit that the item sits in, or the kit itself. */
  readonly kitId: string | null
}

interface ItemRow {
  [column: string]: unknown
  id: string
  designation: string
  category: Category
  details: Record<string, unknown>
  acquired_on: string | null
  kit_id: string | null
}

const ITEM: Statement = {
  name: 'test-item',
  text: `SELECT id, designation, category, details, acquired_on::text, kit_id FROM item
    WHERE group_id = $1 AND id = $2`,
}
const KIT: Statement = {
  name: 'test-kit',
  text: 'SELECT id, designation FROM kit WHERE group_id = $1 AND id = $2',
}

/** 404 when it is not in the group, a fault of the field when the procedure is not done to such a thing. */
export async function readSubject(tx: GroupTx, body: RecordTestBody): Promise<TestSubject> {
  if ('kitId' in body) return readKitSubject(tx, body.kitId)
  const item = await readItemSubject(tx, body.itemId)
  if (item.category !== 'kit' && canBeTested(item.category, body.procedure)) return item
  const subjects = SUBJECTS[body.procedure]
  const fitting = Array.isArray(subjects) ? subjects.join(', ') : 'kits'
  throw invalidField(
    '#/itemId',
    `${item.designation} is ${withArticle(item.category)}; this procedure is for: ${fitting}.`,
  )
}

export async function readItemSubject(tx: GroupTx, itemId: string): Promise<TestSubject> {
  const [row] = await tx.sql<ItemRow>(ITEM, [tx.groupId, itemId])
  if (!row) throw notFound('item')
  return {
    type: 'item',
    id: row.id,
    designation: row.designation,
    category: row.category,
    facts: itemFacts(row.details, row.acquired_on),
    details: row.details,
    kitId: row.kit_id,
  }
}

export async function readKitSubject(tx: GroupTx, kitId: string): Promise<TestSubject> {
  const [row] = await tx.sql<{ id: string; designation: string }>(KIT, [tx.groupId, kitId])
  if (!row) throw notFound('kit')
  return { type: 'kit', ...row, category: 'kit', facts: {}, details: {}, kitId: row.id }
}

interface InstrumentRow {
  [column: string]: unknown
  id: string
  designation: string
  category: Category
  details: Record<string, unknown>
}

const INSTRUMENT: Statement = {
  name: 'test-instrument',
  text: 'SELECT id, designation, category, details FROM item WHERE group_id = $1 AND id = $2',
}
const OPERATOR: Statement = {
  name: 'test-operator',
  text: 'SELECT id, name FROM member WHERE group_id = $1 AND id = $2',
}

/** The instrument named, or null where none is. Faults name the field. */
export async function readInstrument(tx: GroupTx, body: RecordTestBody): Promise<InstrumentRow | null> {
  if (body.instrumentId === undefined) return null
  if ('itemId' in body && body.instrumentId === body.itemId)
    throw invalidField('#/instrumentId', 'A thing cannot be measured with itself.')
  const [row] = await tx.sql<InstrumentRow>(INSTRUMENT, [tx.groupId, body.instrumentId])
  if (!row) throw invalidField('#/instrumentId', 'There is no such instrument in your group.')
  return row
}

const PARTNER: Statement = {
  name: 'test-partner',
  text: 'SELECT category FROM item WHERE group_id = $1 AND id = $2',
}

/** The other unit of a pair is another thing of the same category. */
export async function checkPartner(tx: GroupTx, body: RecordTestBody): Promise<void> {
  if (body.procedure !== 'pair-loss' || body.inputs.partnerId === undefined) return
  const { partnerId } = body.inputs
  if (partnerId === body.itemId)
    throw invalidField('#/inputs/partnerId', 'A unit cannot be joined to itself: choose the other one.')
  const [row] = await tx.sql<{ category: Category }>(PARTNER, [tx.groupId, partnerId])
  if (!row || !canBeTested(row.category, 'pair-loss'))
    throw invalidField('#/inputs/partnerId', 'There is no such transformer in your group.')
}

export async function readOperator(tx: GroupTx, operatorId: string): Promise<{ id: string; name: string }> {
  const [row] = await tx.sql<{ id: string; name: string }>(OPERATOR, [tx.groupId, operatorId])
  if (!row) throw invalidField('#/operatorId', 'There is no such member in your group.')
  return row
}

interface SupersededRow {
  [column: string]: unknown
  procedure: string
  subject_id: string
  taken: boolean
}

const SUPERSEDED: Statement = {
  name: 'test-superseded',
  text: `SELECT t.procedure, coalesce(t.item_id, t.kit_id) AS subject_id,
      EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id AND s.id <> $3) AS taken
    FROM test t WHERE t.group_id = $1 AND t.id = $2`,
}

/** The test that is corrected must be there, about the same thing, and not corrected before. */
export async function checkSuperseded(tx: GroupTx, testId: string, body: RecordTestBody): Promise<void> {
  if (!body.supersedes) return
  const [row] = await tx.sql<SupersededRow>(SUPERSEDED, [tx.groupId, body.supersedes.testId, testId])
  const subjectId = 'kitId' in body ? body.kitId : body.itemId
  if (!row) throw invalidField('#/supersedes/testId', 'There is no such test in your group.')
  if (row.procedure !== body.procedure || row.subject_id !== subjectId)
    throw invalidField('#/supersedes/testId', 'That test is about something else.')
  if (row.taken) throw alreadySuperseded()
}

export function alreadySuperseded(): AppError {
  return new AppError(
    'already-superseded',
    'Open the test that corrected it, and correct that one if need be.',
  )
}
