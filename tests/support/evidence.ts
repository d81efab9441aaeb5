/** Kits with items and bodies of tests, for tests of evidence and readiness. */
import { v7 as uuidv7 } from 'uuid'
import type { RecordTestInput } from '#shared/contracts/record-test.ts'
import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import type { Band, Category } from '#shared/engine/vocabulary.ts'
import {
  givenItem,
  givenKit,
  givenKitKind,
  into,
  moved,
  type Item,
  type Kit,
  type KitKind,
} from './registry.ts'
import type { TestClient } from './test-client.ts'

/** A kit with one item in every position of its kind, each with the details given for its category. */
export interface Station {
  readonly kind: KitKind
  readonly kit: Kit
  /** The first item of each category. */
  readonly items: Readonly<Partial<Record<Category, Item>>>
}

type Details = Partial<Record<Category, object>>

export async function givenStation(
  by: TestClient,
  parts: { kind?: KitKind; details?: Details; kit?: object } = {},
): Promise<Station> {
  const kind = parts.kind ?? (await givenKitKind(by))
  const kit = await givenKit(by, kind, parts.kit)
  const items: Partial<Record<Category, Item>> = {}
  for (const position of kit.positions) {
    for (let n = 0; n < position.quantity; n += 1) {
      const { category } = position
      const details = { category, ...parts.details?.[category] }
      const item = await givenItem(by, category, { details })
      items[category] ??= await moved(by, item, into(kit, category))
    }
  }
  return { kind, kit, items }
}

export const newTestId = () => uuidv7()

interface Common {
  performedAt: string
  instrumentId: string
}

/** A full run: rises by `riseK` over ten minutes at 50 W. */
export function heatTest(
  itemId: string,
  { performedAt, instrumentId }: Common,
  fields: { band?: Band; powerW?: number; riseK?: number } = {},
): Extract<RecordTestInput, { procedure: 'heat-test' }> {
  const { band = '10 m', powerW = 50, riseK = 40 } = fields
  const minutes = [0, 1, 2, 3, 5, 8, 10]
  return {
    procedure: 'heat-test',
    itemId,
    performedAt,
    instrumentId,
    method: 'Key-down, 2450 ohm fixture',
    inputs: {
      band,
      powerW,
      load: 'fixture-2450',
      enclosure: 'closed',
      ambientC: 22,
      readings: minutes.map((minute) => ({ atS: minute * 60, temperatureC: 22 + (riseK * minute) / 10 })),
      keyUpAtS: 600,
      stoppedAtLimit: false,
    },
  }
}

/** The key came up at the stop temperature after 8.2 minutes. */
export function stoppedHeatTest(itemId: string, common: Common, band: Band = '10 m') {
  const whole = heatTest(itemId, common, { band, riseK: 76 })
  const readings = [
    ...whole.inputs.readings.filter(({ atS }) => atS <= 480),
    { atS: 492, temperatureC: 85 },
    { atS: 792, temperatureC: 71 },
  ]
  return { ...whole, inputs: { ...whole.inputs, readings, keyUpAtS: 492, stoppedAtLimit: true } }
}

export function inspection(itemId: string, performedAt: string, found = '') {
  return {
    procedure: 'inspection' as const,
    itemId,
    performedAt,
    method: 'Looked at and shaken',
    inputs: { serviceable: found === '', found },
  }
}

export function calibration(itemId: string, performedAt: string, passed = true) {
  return {
    procedure: 'calibration' as const,
    itemId,
    performedAt,
    method: 'Compared with a reference',
    inputs: { passed },
  }
}

export function fullCount(kit: Kit, performedAt: string, seal: string | null = null) {
  return {
    procedure: 'count' as const,
    kitId: kit.id,
    performedAt,
    method: 'Counted against the load plan',
    inputs: {
      positions: kit.positions.map(({ id, quantity }) => ({ positionId: id, found: quantity })),
      sealFound: kit.sealNumber,
      sealApplied: seal,
    },
  }
}

/** Records a test and answers it as stored. */
export async function recorded(by: TestClient, body: object, testId = newTestId()): Promise<StoredTest> {
  const answer = await by.put(`/api/v1/tests/${testId}`, body)
  if (answer.status !== 200) throw new Error(`${answer.status} ${JSON.stringify(answer.body)}`)
  return answer.body as StoredTest
}
