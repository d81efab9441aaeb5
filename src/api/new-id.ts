import { v7 } from 'uuid'

/** An id for something that this device creates: UUIDv7, so that ids sort by time of making. */
export function uuidv7(): string {
  return v7()
}
