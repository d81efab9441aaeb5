import type { RegistryRow } from '../../entities/RegistryRow.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { lockAt, refuseRetired } from './locks.ts'
import type { Thing } from './thing.ts'
import { save } from './update-thing.ts'

interface Retirement {
  readonly id: string
  /** The version that the caller read. */
  readonly version: number
  readonly reason: string
}

/** Retires a thing with a reason; it stays on record. `state-conflict` when it is retired already or still in use. */
export async function retireThing<Row extends RegistryRow, Body extends object, Answer>(
  tx: GroupTx,
  thing: Thing<Row, Body, Answer>,
  { id, version, reason }: Retirement,
): Promise<Answer> {
  const row = await lockAt(tx, thing, { id, version })
  const name = thing.nameOf(row)
  refuseRetired(row, name)
  const kitIds = (await thing.dependingKits?.(tx, row)) ?? []
  const cleared = (await thing.retire?.(tx, row)) ?? {}
  await save(tx, thing, row, { ...cleared, retiredAt: tx.now, retiredReason: reason } as Partial<Row>)
  await record(tx, {
    action: `${thing.subject}-retired`,
    subjectType: thing.subject,
    subjectId: id,
    kitId: thing.kitOf?.(row) ?? null,
    summary: `retired ${name}: ${reason}`,
    before: { retiredReason: null },
    after: { retiredReason: reason },
  })
  await rewriteReadiness(tx, kitIds)
  return (await thing.read(tx, id))!
}

/** Brings a retired thing back as it was. `state-conflict` when it is not retired. */
export async function bringBackThing<Row extends RegistryRow, Body extends object, Answer>(
  tx: GroupTx,
  thing: Thing<Row, Body, Answer>,
  { id, version }: { id: string; version: number },
): Promise<Answer> {
  const row = await lockAt(tx, thing, { id, version })
  const name = thing.nameOf(row)
  if (!row.retiredAt) throw new AppError('state-conflict', `${name} is not retired.`)
  await thing.bringBack?.(tx, row)
  await save(tx, thing, row, { retiredAt: null, retiredReason: null } as Partial<Row>)
  await record(tx, {
    action: `${thing.subject}-brought-back`,
    subjectType: thing.subject,
    subjectId: id,
    kitId: thing.kitOf?.(row) ?? null,
    summary: `brought ${name} back`,
    before: { retiredReason: row.retiredReason },
    after: { retiredReason: null },
  })
  await rewriteReadiness(tx, (await thing.dependingKits?.(tx, row)) ?? [])
  return (await thing.read(tx, id))!
}
