import type { KitState } from '#shared/engine/readiness/types.ts'
import { capacity, feedlineLoss, radioCheck, sweep } from '../evidence.ts'
import { calibration, count } from '../more-evidence.ts'
import { PW, TB, XB } from '../kinds.ts'
import { aKit, withTests } from '../kits.ts'
import { AUTUMN, SPRING } from './stations.ts'
import { battery, LITHIUM_30, part, type Pack } from './things.ts'

const RELAY_FACTS: Readonly<Record<string, object>> = {
  radio: { bands: ['2 m'], ratedWatts: 50, meanLoadA: 4 },
  antenna: { bands: ['2 m'] },
  feedline: { lossDb: { '2 m': 1.4 } },
}

/** A relay kit, proven but for its feedline. */
export function relayKit(number: string, batteries: readonly [string, string]): KitState {
  const names = XB.positions.map(({ name }) => name).filter((name) => !name.startsWith('battery'))
  const kit = aKit(`K-${number}`, XB, [
    ...names.map((name) => part(number, name, RELAY_FACTS[name])),
    battery(batteries[0], 'battery A', LITHIUM_30),
    battery(batteries[1], 'battery B', LITHIUM_30),
  ])
  return withTests(
    kit,
    sweep(`ANT-${number}`, { '2 m': 1.4 }, AUTUMN),
    radioCheck(`RAD-${number}`, { '2 m': 50 }, SPRING, 50),
    capacity(batteries[0], 96.3, AUTUMN),
    capacity(batteries[1], 96.3, AUTUMN),
    count(kit, AUTUMN),
  )
}

export function provenRelayKit(number: string, batteries: readonly [string, string]): KitState {
  return withTests(relayKit(number, batteries), feedlineLoss(`FDL-${number}`, { '2 m': 1.4 }, AUTUMN))
}

/** A power kit: batteries by id and measured percent. */
export function powerKit(number: string, pack: Pack, percents: Readonly<Record<string, number>>): KitState {
  const names = PW.positions.map(({ name }) => name).filter((name) => name !== 'batteries')
  const kit = aKit(`K-${number}`, PW, [
    ...names.map((name) => part(number, name)),
    ...Object.keys(percents).map((id) => battery(id, 'batteries', pack)),
  ])
  const tests = Object.entries(percents).map(([id, percent]) => capacity(id, percent, AUTUMN))
  return withTests(kit, ...tests, count(kit, AUTUMN))
}

const CALIBRATED = ['VNA', 'WTM', 'IRT', 'BTT', 'DMM']

/** A test bench; the instruments are calibrated in May but where `calibratedOn` says otherwise. */
export function testBench(number: string, calibratedOn: Readonly<Record<string, string>> = {}): KitState {
  const kit = aKit(
    `K-${number}`,
    TB,
    TB.positions.map(({ name }) => part(number, name)),
  )
  const tests = CALIBRATED.map((prefix) => {
    const id = `${prefix}-${number}`
    return calibration(id, calibratedOn[id] ?? '2026-05-09')
  })
  return withTests(kit, ...tests)
}
