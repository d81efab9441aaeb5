import type { Band } from '#shared/engine/vocabulary.ts'
import type { BatchKey } from '../builds.ts'
import type { DemoTest } from '../demo-test.ts'
import { noisy, rounded } from '../random.ts'

/** How transformers warm: section 5 of the scenario. */

const HEAT_CAPACITY_J_PER_K = 90
const TIME_CONSTANT_S = 2000
/** Steady rise of one watt lost, K. */
const K_PER_W = TIME_CONSTANT_S / HEAT_CAPACITY_J_PER_K
export const STOP_C = 85
const FULL_RUN_S = 600
/** The cooling is read once, five minutes after the key came up. */
const COOLING_S = 300
const READ_AT_MINUTES = [0, 1, 2, 3, 5, 8, 10]

type ByBand = Readonly<Partial<Record<Band, number>>>

/** Share of the power that each batch passes on; former units were like batch A. */
export const EFFICIENCY: Readonly<Record<BatchKey | 'former', ByBand>> = {
  A: { '40 m': 0.93, '20 m': 0.92, '15 m': 0.9, '10 m': 0.87 },
  B: { '40 m': 0.92, '20 m': 0.88, '15 m': 0.83, '10 m': 0.74 },
  C: { '40 m': 0.93, '20 m': 0.92, '15 m': 0.89, '10 m': 0.86 },
  former: { '40 m': 0.92, '20 m': 0.91, '15 m': 0.89, '10 m': 0.86 },
}

/** Rise above ambient after a time under a carrier, K. */
function riseK(powerW: number, efficiency: number, atS: number): number {
  return powerW * (1 - efficiency) * K_PER_W * (1 - Math.exp(-atS / TIME_CONSTANT_S))
}

/** The ambient temperature at which a run reaches the stop temperature just then. */
export function ambientForStop(efficiency: number, stopS: number): number {
  return rounded(STOP_C - riseK(50, efficiency, stopS), 1)
}

export interface HeatRun {
  /** Names the noise of this run. */
  readonly name: string
  readonly band: Band
  readonly powerW: number
  readonly efficiency: number
  readonly ambientC: number
  /** When the key came up at the stop temperature; absent: the whole ten minutes. */
  readonly stopS?: number
}

type HeatInputs = Extract<DemoTest, { procedure: 'heat-test' }>['inputs']

/** The readings of a run, each with the noise of the probe. */
export function heatInputs(run: HeatRun): HeatInputs {
  const { name, band, powerW, efficiency, ambientC, stopS } = run
  const keyUpAtS = stopS ?? FULL_RUN_S
  const endC = stopS === undefined ? ambientC + riseK(powerW, efficiency, keyUpAtS) : STOP_C
  const times = READ_AT_MINUTES.map((minute) => minute * 60).filter((atS) => atS < keyUpAtS)
  const read = (atS: number, temperatureC: number) => ({
    atS,
    temperatureC: noisy(`${name} at ${atS}`, temperatureC, { reach: 0.05, digits: 1 }),
  })
  const cooledC = ambientC + (endC - ambientC) * Math.exp(-COOLING_S / TIME_CONSTANT_S)
  return {
    band,
    powerW,
    load: 'fixture-2450',
    enclosure: 'closed',
    ambientC,
    readings: [
      ...times.map((atS) => read(atS, ambientC + riseK(powerW, efficiency, atS))),
      stopS === undefined ? read(keyUpAtS, endC) : { atS: keyUpAtS, temperatureC: STOP_C },
      read(keyUpAtS + COOLING_S, cooledC),
    ],
    keyUpAtS,
    stoppedAtLimit: stopS !== undefined,
    swr: swrSeen(name),
    conditions: 'Probe taped under the winding, lid on, in the shade',
  }
}

/** Moves by less than a tenth: the limit is 0.2. */
function swrSeen(name: string): HeatInputs['swr'] {
  const start = noisy(`${name} swr`, 1.2, { reach: 0.02, digits: 2 })
  return { start, lowest: rounded(start - 0.01, 2), highest: rounded(start + 0.05, 2) }
}
