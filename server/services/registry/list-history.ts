import type { z } from 'zod'
import type { HISTORY_SUBJECTS, historyEntry } from '#shared/contracts/history.ts'
import type { AppContext } from '../../context.ts'
import { notFound } from '../../errors.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import type { By } from './thing.ts'
import { instant } from './values.ts'

type Subject = (typeof HISTORY_SUBJECTS)[number]
type Answer = z.input<typeof historyEntry>

const TABLES: Readonly<Record<Subject, string>> = {
  kit: 'kit',
  item: 'item',
  place: 'place',
  'kit-kind': 'kit_kind',
  'build-sheet': 'build_sheet',
  batch: 'batch',
  consumable: 'consumable',
  policy: 'policy',
}

/** Two walks down an index each, at most a page long; a kit's second walk finds what happened to things in it. */
const PAGE: Statement = {
  name: 'list-history',
  text: `SELECT id::text, at, actor, member_id, action, subject_type, subject_id, summary, before, after
    FROM audit_event WHERE id IN (
      (SELECT id FROM audit_event WHERE group_id = $1 AND subject_id = $2 AND subject_type = $3
        AND id < $4::bigint ORDER BY id DESC LIMIT $5)
      UNION (SELECT id FROM audit_event WHERE group_id = $1 AND kit_id = $2 AND $3 = 'kit'
        AND id < $4::bigint ORDER BY id DESC LIMIT $5))
    ORDER BY audit_event.id DESC LIMIT $5`,
}

const NEWEST = '9223372036854775807'

interface Row {
  id: string
  at: Date
  actor: string
  member_id: string | null
  action: string
  subject_type: string | null
  subject_id: string | null
  summary: string
  before: Record<string, unknown> | null
  after: Record<string, unknown> | null
}

function entryOf(row: Row): Answer {
  return {
    id: row.id,
    at: instant(row.at),
    actor: row.actor,
    memberId: row.member_id,
    action: row.action,
    subjectType: row.subject_type,
    subjectId: row.subject_id,
    summary: row.summary,
    before: row.before,
    after: row.after,
  }
}

interface HistoryQuery {
  readonly subjectType: Subject
  readonly subjectId: string
  readonly size: number
  /** The last id of the page before. */
  readonly before?: string
}

/** Who changed what about one thing, latest first; `next` asks for the page after this one. */
export function listHistory(
  ctx: AppContext,
  by: By,
  { subjectType, subjectId, size, before = NEWEST }: HistoryQuery,
): Promise<{ rows: Answer[]; next: string | null }> {
  return inGroup(ctx, by, async (tx) => {
    const [subjects, rows] = await Promise.all([
      tx.sql(existence(subjectType), [tx.groupId, subjectId]),
      tx.sql<Row>(PAGE, [tx.groupId, subjectId, subjectType, before, size + 1]),
    ])
    if (subjects.length === 0) throw notFound(subjectType.replace('-', ' '))
    const page = rows.slice(0, size).map(entryOf)
    return { rows: page, next: rows.length > size ? page.at(-1)!.id : null }
  })
}

const existence = (subject: Subject): Statement => ({
  name: `${subject}-to-show`,
  text: `SELECT 1 FROM ${TABLES[subject]} WHERE group_id = $1 AND id = $2`,
})
