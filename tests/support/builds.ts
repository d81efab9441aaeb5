/** Build sheets, batches and measured units for tests, made through the API. */
import { v7 as uuidv7 } from 'uuid'
import type { Band } from '#shared/engine/vocabulary.ts'
import { newTestId, recorded } from './evidence.ts'
import { fresh, givenItem, type Item } from './registry.ts'
import type { TestClient } from './test-client.ts'

const DETAILS = {
  category: 'transformer',
  core: '240-size toroid',
  turnsPrimary: 2,
  turnsSecondary: 14,
  bands: ['40 m', '10 m'],
}

async function made(by: TestClient, path: string, body: object): Promise<string> {
  const id = uuidv7()
  const answer = await by.put(`${path}/${id}`, body)
  if (answer.status !== 200) throw new Error(answer.text)
  return id
}

export const givenBuildSheet = (by: TestClient, fields: object = {}) =>
  made(by, '/api/v1/build-sheets', { name: fresh('Sheet'), details: DETAILS, ...fields })

export const givenBatchOf = (by: TestClient, buildSheetId: string) =>
  made(by, '/api/v1/batches', { buildSheetId, name: fresh('Batch') })

/** `count` transformers of a batch. */
export async function givenUnits(by: TestClient, batchId: string, count: number): Promise<Item[]> {
  const units: Item[] = []
  for (let n = 0; n < count; n += 1) units.push(await givenItem(by, 'transformer', { batchId }))
  return units
}

interface PairMeasured {
  readonly performedAt: string
  readonly instrumentId: string
  readonly efficiency: Partial<Record<Band, number>>
}

/** The loss of a unit by band, measured as a pair whose other half is alike. */
export function pairLoss(by: TestClient, itemId: string, { efficiency, ...common }: PairMeasured) {
  const bands = Object.entries(efficiency).map(([band, each]) => ({ band, inW: 50, outW: 50 * each ** 2 }))
  const body = {
    procedure: 'pair-loss',
    itemId,
    ...common,
    method: 'Pair back to back',
    inputs: { meters: 'one-moved', bands },
  }
  return recorded(by, body, newTestId())
}
