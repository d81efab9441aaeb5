import type { z } from 'zod'
import type {
  ExposureEvaluation,
  ExposureRecord,
  recordExposure as contract,
} from '#shared/contracts/kit-exposure.ts'
import { exposureChanges, type ExposureConfiguration } from '#shared/engine/exposure-changes.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { periodsFrom } from '../period-rows.ts'
import { sameContent } from '../registry/changes.ts'
import { idTaken, namingDuplicates } from '../registry/duplicates.ts'
import { lockNewId } from '../registry/locks.ts'
import { kitAntenna } from './kit-antenna.ts'
import { readKitFace } from './kit-face.ts'
import { evaluateKit, knownPowers } from './read-kit-exposure.ts'

/** RF exposure evaluations that somebody put on record: what was assumed, what followed, who and when. */

interface Row {
  [column: string]: unknown
  id: string
  kit_id: string
  recorded_on: string
  recorded_at: Date
  recorded_by: string
  configuration: ExposureConfiguration
  evaluation: ExposureEvaluation
}

const SELECT = `SELECT e.id, e.kit_id, e.recorded_on::text, e.recorded_at, m.name AS recorded_by, e.configuration,
    e.evaluation
  FROM exposure_record e JOIN member m ON m.id = e.recorded_by`
const READ: Statement = {
  name: 'read-exposure-record',
  text: `${SELECT} WHERE e.group_id = $1 AND e.id = $2`,
}
const NEWEST: Statement = {
  name: 'newest-exposure-records',
  text: `${SELECT} WHERE e.group_id = $1 AND e.kit_id = $2 ORDER BY e.recorded_at DESC, e.id DESC LIMIT $3`,
}
const INSERT: Statement = {
  name: 'insert-exposure-record',
  text: `INSERT INTO exposure_record (id, group_id, kit_id, recorded_on, recorded_at, recorded_by, configuration, evaluation)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8)`,
}
const MOST = 20

type NewRecord = z.output<typeof contract.body> & { readonly kitId: string }

/** Stores what the kit as it stands gives; the same request again gets the first answer. */
export async function recordExposure(
  tx: GroupTx,
  { kitId, recordId, ...use }: NewRecord,
): Promise<ExposureRecord> {
  await lockNewId(tx, recordId)
  const face = await readKitFace(tx, kitId)
  const known = await readOne(tx, recordId)
  if (known) return sameAgain(tx, known, { kitId, use })
  const [evaluation, configuration] = await Promise.all([
    evaluateKit(tx, { kitId, use }),
    configurationNow(tx, kitId),
  ])
  if (evaluation.bands.length === 0)
    throw new AppError('request-invalid', `No band of ${face.designation} has a known power at the antenna.`)
  const values = [
    await tx.today(),
    tx.now,
    tx.actor.memberId,
    JSON.stringify(configuration),
    JSON.stringify(evaluation),
  ]
  await namingDuplicates(() => tx.sql(INSERT, [recordId, tx.groupId, kitId, ...values]))
  await record(tx, {
    action: 'exposure-recorded',
    subjectType: 'kit',
    subjectId: kitId,
    kitId,
    summary: `put the RF exposure evaluation of ${face.designation} on record`,
  })
  return answered((await readOne(tx, recordId))!, configuration)
}

async function sameAgain(
  tx: GroupTx,
  known: Row,
  { kitId, use }: { readonly kitId: string; readonly use: Omit<NewRecord, 'kitId' | 'recordId'> },
): Promise<ExposureRecord> {
  if (known.kit_id !== kitId || !sameContent({ ...use }, { ...known.evaluation.use })) throw idTaken()
  return answered(known, await configurationNow(tx, kitId))
}

async function readOne(tx: GroupTx, recordId: string): Promise<Row | undefined> {
  return (await tx.sql<Row>(READ, [tx.groupId, recordId]))[0]
}

/** Newest first. */
export async function exposureRecords(tx: GroupTx, kitId: string, most = MOST): Promise<ExposureRecord[]> {
  const rows = await tx.sql<Row>(NEWEST, [tx.groupId, kitId, most])
  if (rows.length === 0) return []
  const now = await configurationNow(tx, kitId)
  return rows.map((row) => answered(row, now))
}

async function configurationNow(tx: GroupTx, kitId: string): Promise<ExposureConfiguration> {
  const [antenna, stored] = await Promise.all([kitAntenna(tx, kitId), periodsFrom(tx, [kitId], tx.now)])
  return { antenna, bands: knownPowers(stored.get(kitId)?.[0]?.capability.bands ?? []) }
}

function answered({ id, ...row }: Row, now: ExposureConfiguration): ExposureRecord {
  return {
    id,
    ...row.evaluation,
    recordedOn: row.recorded_on,
    recordedAt: row.recorded_at.toISOString(),
    recordedBy: row.recorded_by,
    changed: exposureChanges(row.configuration, now),
  }
}
