import type { EntityTarget, FindOptionsWhere } from 'typeorm'
import type { RegistryRow } from '../../entities/RegistryRow.ts'
import { AppError, notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import type { Thing } from './thing.ts'

const LOCK_ID: Statement = {
  name: 'lock-new-id',
  text: 'SELECT pg_advisory_xact_lock(hashtextextended($1, 0))',
}

/** Makes two requests that carry the same id made by the client wait for each other. */
export async function lockNewId(tx: GroupTx, id: string): Promise<void> {
  await tx.sql(LOCK_ID, [id])
}

/** The row, locked, at the version that the caller read: 404 when absent, 412 with the record of now when stale. */
export async function lockAt<Row extends RegistryRow, Body extends object, Answer>(
  tx: GroupTx,
  thing: Thing<Row, Body, Answer>,
  { id, version }: { id: string; version: number },
): Promise<Row> {
  const row = thing.lock ? await thing.lock(tx, id) : await lockRow(tx, thing.entity, id)
  if (!row) throw notFound(thing.word)
  if (row.version === version) return row
  throw new AppError('version-stale', `${thing.nameOf(row)} was changed meanwhile. Nothing was saved.`, {
    current: await thing.read(tx, id),
  })
}

export function lockRow<Row extends RegistryRow>(
  tx: GroupTx,
  entity: EntityTarget<Row>,
  id: string,
): Promise<Row | null> {
  return tx.repository(entity).findOneForUpdate({ id } as FindOptionsWhere<Row>)
}

/** A retired thing is read, never changed. */
export function refuseRetired(row: RegistryRow, name: string): void {
  if (row.retiredAt) throw new AppError('state-conflict', `${name} is retired. Bring it back first.`)
}
