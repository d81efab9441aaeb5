import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { readForecast as contract } from '#shared/contracts/forecast.ts'
import { startOfDayUtc } from '#shared/engine/local-day.ts'
import { addMonths } from '#shared/engine/plain-date.ts'
import { loadByWeek, type DatedCheck } from '#shared/engine/readiness/due-load.ts'
import { forecast, type ForecastKit } from '#shared/engine/readiness/forecast.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'
import type { Availability } from '#shared/engine/vocabulary.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { periodsFrom } from '../period-rows.ts'
import { checksOfGroup } from './group-checks.ts'

const MONTHS = 12

const STATIONS: Statement = {
  name: 'forecast-stations',
  text: `SELECT k.id, k.designation, k.availability FROM kit k JOIN kit_kind kk ON kk.id = k.kit_kind_id
    WHERE k.group_id = $1 AND k.retired_at IS NULL AND kk.station`,
}

interface StationRow {
  [column: string]: unknown
  id: string
  designation: string
  availability: Availability
}

/** The coming year as the stored periods say it, and the work that falls due meanwhile. */
export async function readForecast(tx: GroupTx): Promise<ResponseOf<typeof contract>> {
  const [zone, today, stations, parts] = await Promise.all([
    tx.zone(),
    tx.today(),
    tx.sql<StationRow>(STATIONS, [tx.groupId]),
    checksOfGroup(tx),
  ])
  const lastDay = addMonths(today, MONTHS)
  const end = startOfDayUtc(lastDay, zone)
  if (typeof end !== 'number') throw new Error(end.message)
  const { start, steps } = forecast(await withPeriods(tx, stations), end)
  const checks = parts.flatMap((part) => part.checks)
  return {
    from: tx.now.toISOString(),
    to: new Date(end).toISOString(),
    start,
    steps: steps.map(({ at, changes, tally }) => ({
      at: new Date(at).toISOString(),
      tally,
      changes: [...changes],
    })),
    overdue: checks.filter(({ state }) => state === 'overdue').length,
    weeks: loadByWeek(checks.flatMap(dated), today, lastDay),
  }
}

async function withPeriods(tx: GroupTx, stations: readonly StationRow[]): Promise<ForecastKit[]> {
  const periods = await periodsFrom(
    tx,
    stations.map(({ id }) => id),
    tx.now,
  )
  return stations.map(({ id, designation, availability }) => {
    return { kitId: id, designation, availability, periods: periods.get(id) ?? [] }
  })
}

const dated = ({ procedure, vital, dueOn }: CheckState): DatedCheck[] =>
  dueOn === null ? [] : [{ procedure, vital, dueOn }]
