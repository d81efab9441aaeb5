import type { z } from 'zod'
import type { readBoard } from '#shared/contracts/board.ts'
import { VERDICTS } from '#shared/engine/vocabulary.ts'
import { AppError } from '../../errors.ts'
import { escapeLike } from '../registry/list-page.ts'

export type BoardQuery = z.output<typeof readBoard.query>

/** Where the next page begins: the place of the last row in the order of the board. */
export interface BoardKey {
  readonly rank: number
  /** Epoch ms; Infinity: never. In an as-of board the designation sorts instead. */
  readonly sort: number | string
  readonly kitId: string
}

/** The filters as values of a statement, an absent one as null; `$2` and on in every statement of the board. */
export function filterValues(query: BoardQuery): unknown[] {
  return [
    query.verdict ?? null,
    query.availability ?? null,
    query.kind ?? null,
    query.place ?? null,
    query.station ?? null,
    query.search === '' ? null : `%${escapeLike(query.search)}%`,
  ]
}

export function isFiltered(query: BoardQuery): boolean {
  return filterValues(query).some((value) => value !== null)
}

export function encodeKey({ rank, sort, kitId }: BoardKey): string {
  return Buffer.from(JSON.stringify([rank, sort === Infinity ? null : sort, kitId])).toString('base64url')
}

/** A cursor that was changed is refused rather than guessed at. */
export function decodeKey(after: string, sortType: 'number' | 'string'): BoardKey {
  const refused = new AppError('request-malformed', 'Check the query parameters.', {
    errors: [{ pointer: '#/after', detail: 'Not a place on this board: begin again at the first page.' }],
  })
  let parts: unknown
  try {
    parts = JSON.parse(Buffer.from(after, 'base64url').toString('utf8'))
  } catch {
    throw refused
  }
  if (!Array.isArray(parts) || parts.length !== 3) throw refused
  const [rank, given, kitId] = parts as unknown[]
  const sort = given === null && sortType === 'number' ? Infinity : given
  const isRank = typeof rank === 'number' && VERDICTS[rank] !== undefined
  if (!isRank || typeof sort !== sortType || typeof kitId !== 'string' || !UUID.test(kitId)) throw refused
  if (typeof sort === 'number' && sort !== Infinity && Math.abs(sort) > LAST_MS) throw refused
  return { rank, sort: sort as number | string, kitId }
}

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i
/** The last instant that JavaScript knows. */
const LAST_MS = 8.64e15
