/** Things of the registry for tests, made through the API. Every helper answers the record. */
import type { Test } from 'supertest'
import { v7 as uuidv7 } from 'uuid'
import type { z } from 'zod'
import type { itemRecord } from '#shared/contracts/items.ts'
import type { kitKindRecord } from '#shared/contracts/kit-kinds.ts'
import type { kitRecord } from '#shared/contracts/kits.ts'
import type { placeRecord } from '#shared/contracts/places.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import type { TestClient } from './test-client.ts'

export type KitKind = z.output<typeof kitKindRecord>
export type Kit = z.output<typeof kitRecord>
export type Item = z.output<typeof itemRecord>
export type Place = z.output<typeof placeRecord>

let count = 0

/** A name of this test run's own: "PLACE-7". */
export function fresh(prefix: string): string {
  count += 1
  return `${prefix}-${count}`
}

export function position(category: Category, fields: object = {}) {
  return { id: uuidv7(), name: category, category, quantity: 1, vital: true, ...fields }
}

const PROMISE = { bands: ['40 m', '20 m'], modes: ['voice'], watts: 100, hours: 12 }

export function kitKindBody(fields: object = {}) {
  const positions = [position('radio'), position('transformer'), position('battery', { quantity: 2 })]
  return { code: fresh('KK'), name: 'End-fed voice', station: true, promise: PROMISE, positions, ...fields }
}

export async function givenPlace(by: TestClient, fields: object = {}): Promise<Place> {
  return made(by.put(`/api/v1/places/${uuidv7()}`, { name: fresh('Place'), ...fields }))
}

export async function givenKitKind(by: TestClient, fields: object = {}): Promise<KitKind> {
  return made(by.put(`/api/v1/kit-kinds/${uuidv7()}`, kitKindBody(fields)))
}

export async function givenKit(by: TestClient, kind: KitKind, fields: object = {}): Promise<Kit> {
  const body = { designation: fresh('K'), kitKindId: kind.id, ...fields }
  return made(by.put(`/api/v1/kits/${uuidv7()}`, body))
}

export async function givenItem(by: TestClient, category: Category, fields: object = {}): Promise<Item> {
  const body = { designation: fresh('ITEM'), details: { category }, ...fields }
  return made(by.put(`/api/v1/items/${uuidv7()}`, body))
}

/** The position of a kit for a category, as the destination of a move. */
export function into(kit: Kit, category: Category) {
  const found = kit.positions.find((candidate) => candidate.category === category)!
  return { kind: 'position', kitId: kit.id, positionId: found.id }
}

export const to = (place: Place) => ({ kind: 'place', placeId: place.id })
export const NOWHERE = { kind: 'nowhere' }

/** A move of an item, not yet sent; from nowhere unless told. */
export function moveOf(item: Item, destination: object, fields: object = {}) {
  return {
    path: `/api/v1/items/${item.id}/moves`,
    body: { moveId: uuidv7(), from: NOWHERE, to: destination, ...fields },
  }
}

export async function moved(
  by: TestClient,
  item: Item,
  destination: object,
  fields: object = {},
): Promise<Item> {
  const { path, body } = moveOf(item, destination, fields)
  const answer = await made<{ item: Item }>(by.post(path, body))
  return answer.item
}

/** A change at the version that was read. */
export function at(version: number, test: Test): Test {
  return test.set('If-Match', `"${version}"`)
}

async function made<T>(test: Test): Promise<T> {
  const answer = await test
  if (answer.status !== 200) throw new Error(`${answer.status} ${JSON.stringify(answer.body)}`)
  return answer.body as T
}
