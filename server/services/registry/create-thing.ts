import type { DeepPartial, FindOptionsWhere } from 'typeorm'
import type { RegistryRow } from '../../entities/RegistryRow.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { createdBefore } from '../created-before.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { idTaken, namingDuplicates } from './duplicates.ts'
import { lockNewId } from './locks.ts'
import type { Thing } from './thing.ts'

/**
 * Adds a thing under an id made by the client. The same id with the same content again is the same success, even when
 * the thing was changed meanwhile; with other content it is `id-taken`.
 */
export async function createThing<Row extends RegistryRow, Body extends object, Answer>(
  tx: GroupTx,
  thing: Thing<Row, Body, Answer>,
  { id, body }: { id: string; body: Body },
): Promise<Answer> {
  await lockNewId(tx, id)
  const known = await tx.repository(thing.entity).findOneBy({ id } as FindOptionsWhere<Row>)
  if (!known) await insert(tx, thing, { id, body })
  else if (!(await createdBefore(tx, { id, action: `${thing.subject}-created`, body }))) throw idTaken()
  return (await thing.read(tx, id))!
}

async function insert<Row extends RegistryRow, Body extends object, Answer>(
  tx: GroupTx,
  thing: Thing<Row, Body, Answer>,
  { id, body }: { id: string; body: Body },
): Promise<void> {
  await thing.check?.(tx, body, null)
  const columns = {
    ...thing.columns(body),
    ...(await thing.bornWith?.(tx, body)),
    id,
    version: 1,
    createdAt: tx.now,
  }
  const row = await namingDuplicates(() =>
    tx.repository(thing.entity).insert(columns as unknown as DeepPartial<Row>),
  )
  await namingDuplicates(async () => thing.writeParts?.(tx, row, body))
  await record(tx, {
    action: `${thing.subject}-created`,
    subjectType: thing.subject,
    subjectId: id,
    kitId: thing.kitOf?.(row) ?? null,
    summary: `added ${thing.nameOf(row)}`,
    after: body,
  })
  await rewriteReadiness(tx, (await thing.dependingKits?.(tx, row)) ?? [])
}
