import type { FindOptionsWhere } from 'typeorm'
import type { RegistryRow } from '../../entities/RegistryRow.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { changesOf, fieldNames, isEmpty } from './changes.ts'
import { namingDuplicates } from './duplicates.ts'
import { lockAt, refuseRetired } from './locks.ts'
import type { Changes, Thing } from './thing.ts'

interface Update<Body> {
  readonly id: string
  /** The version that the caller read. */
  readonly version: number
  readonly body: Body
}

/** Changes a thing at the version it was read at. What is already so changes nothing and leaves no trace. */
export async function updateThing<Row extends RegistryRow, Body extends object, Answer>(
  tx: GroupTx,
  thing: Thing<Row, Body, Answer>,
  { id, version, body }: Update<Body>,
): Promise<Answer> {
  const row = await lockAt(tx, thing, { id, version })
  const name = thing.nameOf(row)
  refuseRetired(row, name)
  await thing.check?.(tx, body, row)
  const columns = thing.columns(body)
  const changes = merged(
    changesOf(row, columns),
    await namingDuplicates(async () => thing.writeParts?.(tx, row, body)),
  )
  if (!isEmpty(changes)) {
    await save(tx, thing, row, columns)
    await record(tx, {
      action: `${thing.subject}-changed`,
      subjectType: thing.subject,
      subjectId: id,
      kitId: thing.kitOf?.(row) ?? null,
      summary: `changed ${fieldNames(changes)} of ${name}`,
      ...changes,
    })
    await rewriteReadiness(tx, (await thing.dependingKits?.(tx, row)) ?? [])
  }
  return (await thing.read(tx, id))!
}

/** Writes columns of a locked row and raises its version. */
export async function save<Row extends RegistryRow, Body extends object, Answer>(
  tx: GroupTx,
  thing: Thing<Row, Body, Answer>,
  row: Row,
  columns: Partial<Row>,
): Promise<void> {
  const where = { id: row.id } as FindOptionsWhere<Row>
  const next = { ...columns, version: row.version + 1 }
  await namingDuplicates(() => tx.repository(thing.entity).update(where, next))
}

function merged(one: Changes, other: Changes | undefined): Changes {
  return { before: { ...one.before, ...other?.before }, after: { ...one.after, ...other?.after } }
}
