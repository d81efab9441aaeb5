import type { QueryResultRow } from 'pg'
import { normaliseTag } from '#shared/engine/tag.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

interface PageQuery {
  readonly page: number
  readonly size: number
  readonly search: string
  readonly descending: boolean
  readonly sort: string
  readonly retired?: 'no' | 'yes' | 'any'
}

/**
 * One list: its columns, its tables, where a search looks and what it can be sorted by. `t` is the main table; `$1` is
 * the group and `$2` the instant.
 */
export interface ListSource {
  readonly columns: string
  readonly from: string
  readonly search: readonly string[]
  /** The column of the tag, if there is one: a search finds it also as it is read out, "XF-3M9 PM". */
  readonly tag?: string
  /** Sort word of the contract -> SQL expression. */
  readonly sorts: Readonly<Record<string, string>>
}

/** A condition with `?` for each of its values. */
export type Condition = readonly [sql: string, ...values: unknown[]]

/** Those conditions whose value was asked for. */
export function optional(...conditions: readonly (readonly [sql: string, value: unknown])[]): Condition[] {
  return conditions.filter(([, value]) => value !== undefined)
}

/**
 * One page of a list and the count of all. Sorted by one column and then by id, so that pages never overlap; empty
 * values come last in both directions.
 */
export async function listPage<Row extends QueryResultRow>(
  tx: GroupTx,
  source: ListSource,
  { query, conditions }: { query: PageQuery; conditions: readonly Condition[] },
): Promise<{ rows: Row[]; total: number }> {
  const { where, values } = whereClause(tx, source, { query, conditions })
  const [rows, counts] = await Promise.all([
    tx.sql<Row>(unnamed(pageText(source, query, where)), values),
    tx.sql<{ total: number }>(unnamed(`SELECT count(*)::int AS total FROM ${source.from} ${where}`), values),
  ])
  return { rows, total: counts[0]?.total ?? 0 }
}

/** First the ids of the page, from the tables that its filters and its sort need; then the columns of these rows only. */
function pageText({ from, columns, sorts }: ListSource, query: PageQuery, where: string): string {
  const direction = query.descending ? 'DESC' : 'ASC'
  const order = `${direction} NULLS LAST`
  return `WITH page AS MATERIALIZED (
      SELECT t.id, ${sorts[query.sort]} AS sort_key FROM ${from} ${where}
      ORDER BY sort_key ${order}, t.id ${direction} LIMIT ${query.size} OFFSET ${(query.page - 1) * query.size})
    SELECT ${columns} FROM ${from} JOIN page ON page.id = t.id
    WHERE t.group_id = $1 AND $2::timestamptz IS NOT NULL
    ORDER BY page.sort_key ${order}, t.id ${direction}`
}

/** Filters and sorts make too many texts to keep prepared: planned anew each time. */
const unnamed = (text: string): Statement => ({ name: '', text })

function whereClause(
  tx: GroupTx,
  source: ListSource,
  { query, conditions }: { query: PageQuery; conditions: readonly Condition[] },
): { where: string; values: unknown[] } {
  const values: unknown[] = [tx.groupId, tx.now]
  // The instant stands in every statement, so that PostgreSQL knows its type where nothing else uses it.
  const parts = ['t.group_id = $1', '$2::timestamptz IS NOT NULL']
  const all = [...conditions, ...retirement(query), ...search(source, query)]
  for (const [sql, ...own] of all) {
    parts.push(sql.replaceAll('?', () => `$${values.push(own.shift())}`))
  }
  return { where: `WHERE ${parts.join(' AND ')}`, values }
}

function retirement({ retired }: PageQuery): Condition[] {
  if (retired === 'no') return [['t.retired_at IS NULL']]
  return retired === 'yes' ? [['t.retired_at IS NOT NULL']] : []
}

function search(source: ListSource, query: PageQuery): Condition[] {
  if (query.search === '') return []
  const looks = source.search.map((column): [string, string] => [column, query.search])
  const tag = normaliseTag(query.search)
  if (source.tag && tag !== '') looks.push([source.tag, tag])
  const sql = looks.map(([column]) => `${column} ILIKE ?`).join(' OR ')
  return [[`(${sql})`, ...looks.map(([, text]) => `%${escapeLike(text)}%`)]]
}

/** Per cent signs, underscores and backslashes of a search stand for themselves. */
export function escapeLike(search: string): string {
  return search.replace(/[\\%_]/g, '\\$&')
}
