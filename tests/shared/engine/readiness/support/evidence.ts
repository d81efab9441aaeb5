import type { CurrentOf } from '#shared/engine/procedures/radio-currents.ts'
import type { Evidence, TestFinding } from '#shared/engine/readiness/types.ts'
import type { Band, Procedure } from '#shared/engine/vocabulary.ts'
import { aFinding, atLeast, atMost, worst } from './findings.ts'
import { at } from './instants.ts'

export type ByBand = Partial<Record<Band, number>>

/** `on` is '2026-09-12' (then at noon) or '2026-09-12 20:00'; recorded when performed unless `recorded` says. */
export interface When {
  readonly on: string
  readonly recorded?: string
  readonly with?: string
}

export function aTest(
  procedure: Procedure,
  subjectId: string,
  when: When | string,
  findings: readonly TestFinding[],
): Evidence {
  const { on, recorded, with: instrumentId = null } = typeof when === 'string' ? { on: when } : when
  const moment = on.includes(' ') ? on : `${on} 12:00`
  const bands = findings.map(({ band, powerW }) => `${band ?? ''}${powerW ?? ''}`).join('/')
  return {
    id: `${subjectId} ${procedure} ${bands} ${moment}`,
    procedure,
    subjectId,
    performedAt: at(moment),
    performedOn: moment.slice(0, 10),
    recordedAt: at(recorded ?? moment),
    instrumentId,
    finding: worst(findings),
    findings,
  }
}

const perBand = (values: ByBand, judge: (band: Band, value: number) => Omit<TestFinding, 'band' | 'value'>) =>
  (Object.entries(values) as [Band, number][]).map(([band, value]) => ({
    ...judge(band, value),
    band,
    value,
  }))

/** Key-down into the 2450 ohm fixture; stopped at 85 °C when `stoppedAtMin` is given. */
export function heatTest(
  itemId: string,
  band: Band,
  when: When | string,
  run: { powerW?: number; peakC?: number; stoppedAtMin?: number } = {},
): Evidence {
  const { powerW = 50, stoppedAtMin } = run
  const peakC = stoppedAtMin === undefined ? (run.peakC ?? 59) : 85
  return aTest('heat-test', itemId, when, [
    aFinding({
      measure: 'peakC',
      band,
      value: peakC,
      powerW,
      finding: stoppedAtMin === undefined ? 'pass' : 'fail',
      limit: `85 °C at ${powerW} W for 10 min`,
      text: stoppedAtMin === undefined ? `reached ${peakC} °C` : `reached 85 °C after ${stoppedAtMin} min`,
    }),
  ])
}

export function efficiency(itemId: string, values: ByBand, when: When | string, limit = 0.8): Evidence {
  const judge = (_band: Band, value: number) =>
    aFinding({
      measure: 'efficiency',
      finding: atLeast(value, limit),
      limit: `${limit * 100} %`,
      text: `efficiency ${Math.round(value * 100)} %`,
    })
  return aTest('pair-loss', itemId, when, perBand(values, judge))
}

export function sweep(itemId: string, values: ByBand, when: When | string, limit = 2.5): Evidence {
  const judge = (_band: Band, value: number) =>
    aFinding({ measure: 'swr', finding: atMost(value, limit), limit: `SWR ${limit}`, text: `SWR ${value}` })
  return aTest('antenna-sweep', itemId, when, perBand(values, judge))
}

export function feedlineLoss(
  itemId: string,
  values: ByBand,
  when: When | string,
  baselineDb = 1.4,
): Evidence {
  const judge = (_band: Band, value: number) =>
    aFinding({
      measure: 'lossDb',
      finding: atMost(value, baselineDb + 0.8),
      limit: `${baselineDb} + 0.8 dB`,
      text: `loses ${value} dB`,
    })
  return aTest('feedline-loss', itemId, when, perBand(values, judge))
}

export function radioCheck(itemId: string, values: ByBand, when: When | string, ratedW = 100): Evidence {
  const judge = (_band: Band, value: number) =>
    aFinding({
      measure: 'watts',
      finding: atLeast(value, 0.8 * ratedW),
      powerW: ratedW,
      limit: `80 % of ${ratedW} W`,
      text: `delivers ${value} W`,
    })
  return aTest('radio-check', itemId, when, perBand(values, judge))
}

/** A radio check that read supply currents: receiving, and key-down at one power setting. */
export function currentCheck(
  itemId: string,
  { receiveA, transmitA, settingW = 100, of = 'radio' }: Drawn,
  when: When | string,
): Evidence {
  const transmit = [{ settingW, currentA: transmitA }]
  return { ...radioCheck(itemId, { '2 m': settingW }, when, settingW), currents: { of, receiveA, transmit } }
}

interface Drawn {
  readonly receiveA: number | null
  readonly transmitA: number
  readonly settingW?: number
  readonly of?: CurrentOf
}

export function capacity(itemId: string, percent: number, when: When | string): Evidence {
  return aTest('battery-capacity', itemId, when, [
    aFinding({
      measure: 'capacityFraction',
      value: percent / 100,
      finding: atLeast(percent, 80),
      limit: '80 % of rated',
      text: `holds ${percent} % of its rating`,
    }),
  ])
}
