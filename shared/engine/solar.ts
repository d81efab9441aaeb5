/**
 * What a panel gives back in a day. Factors are common practice; method IEEE 1562 (from memory, verify).
 * Source: calculation sheet, section 10.
 */
import { checkPositive } from './check-range.ts'
import { checkNumber, type Outcome } from './outcome.ts'

/** Share of the panel's rating that reaches the battery, by controller. Common practice, no source. */
export const SYSTEM_FACTORS = { plain: 0.65, 'maximum-power': 0.8 } as const

export interface SolarBalance {
  readonly harvestWhPerDay: number
  /** Harvest less 24 h of mean load; negative when the battery runs down. */
  readonly balanceWhPerDay: number
  /** Days until the battery is down; null when it never is, or no energy was given. */
  readonly autonomyDays: number | null
}

/**
 * Panel 0 to 100,000 W, peak sun hours 0 to 24, system factor above 0 to 1, mean load 0 to 100,000 W, usable
 * energy 0 to 1e9 Wh. `E_RANGE`.
 */
export function solarBalance(day: {
  panelW: number
  sunHours: number
  systemFactor: number
  meanLoadW: number
  energyWh?: number
}): Outcome<SolarBalance> {
  const { panelW, sunHours, systemFactor, meanLoadW, energyWh } = day
  const bad =
    checkNumber('panelW', panelW, 0, 100_000) ??
    checkNumber('sunHours', sunHours, 0, 24) ??
    checkPositive('systemFactor', systemFactor, 1) ??
    checkNumber('meanLoadW', meanLoadW, 0, 100_000) ??
    (energyWh === undefined ? undefined : checkNumber('energyWh', energyWh, 0, 1e9))
  if (bad) return bad
  const harvestWhPerDay = panelW * sunHours * systemFactor
  const balanceWhPerDay = harvestWhPerDay - 24 * meanLoadW
  return { harvestWhPerDay, balanceWhPerDay, autonomyDays: autonomy(balanceWhPerDay, energyWh) }
}

function autonomy(balanceWhPerDay: number, energyWh: number | undefined): number | null {
  if (energyWh === undefined || balanceWhPerDay >= 0) return null
  const days = energyWh / -balanceWhPerDay
  return Number.isFinite(days) ? days : null
}
