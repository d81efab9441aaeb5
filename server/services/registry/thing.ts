/**
 * What the families of the registry share: a thing is created once under an id of the client's, changed at the version
 * it was read at, retired with a reason and brought back, and each of that is audited in the same transaction.
 */
import type { EntityTarget } from 'typeorm'
import type { Actor } from '../../caller.ts'
import type { RegistryRow } from '../../entities/RegistryRow.ts'
import type { GroupTx } from '../../group-transaction.ts'

/** Whose group, and who does it: a `Caller` is one. */
export interface By {
  readonly groupId: string
  readonly actor: Actor
}

/** One family. `Body` is what its requests carry, `Answer` what its record looks like from outside. */
export interface Thing<Row extends RegistryRow, Body extends object, Answer> {
  readonly entity: EntityTarget<Row>
  /** Subject type of the audit log, and the beginning of its actions: `kit-kind`. */
  readonly subject: string
  /** In sentences: "kit kind". */
  readonly word: string
  nameOf(row: Row): string
  /** The columns that a body sets, as the database returns them: numerics as text with all their decimals. */
  columns(body: Body): Partial<Row>
  read(tx: GroupTx, id: string): Promise<Answer | undefined>
  /** Locks the row and, before it, what a change of it touches. Plain row lock unless given. */
  lock?(tx: GroupTx, id: string): Promise<Row | null>
  /** Rules that need the database; `row` is null for a new thing. Throws an AppError. */
  check?(tx: GroupTx, body: Body, row: Row | null): Promise<void>
  /** Columns that only a new thing gets: its tag. */
  bornWith?(tx: GroupTx, body: Body): Promise<Partial<Row>>
  /** Writes what hangs on the row. Returns what changed in it, for the audit log. */
  writeParts?(tx: GroupTx, row: Row, body: Body): Promise<Changes | undefined>
  /** Throws unless it may be retired. Returns the columns that retiring clears. */
  retire?(tx: GroupTx, row: Row): Promise<Partial<Row>>
  /** Throws unless it may come back. */
  bringBack?(tx: GroupTx, row: Row): Promise<void>
  /** The kit on whose page the change is shown too. */
  kitOf?(row: Row): string | null
  /** Kits whose readiness depends on the thing. */
  dependingKits?(tx: GroupTx, row: Row): Promise<string[]>
}

/** Changed fields only, before and after. */
export interface Changes {
  readonly before: Record<string, unknown>
  readonly after: Record<string, unknown>
}
