import { v7 } from 'uuid'

/** An id for something that this device creates: UUIDv7, so that ids sort by time of making. */
export function uuidv7(): string {
  return v7()
}

/**
 * Ids for what one form sends: the same content again has the same id, so that it is done once though its answer was
 * lost; other content has another. `done` begins anew.
 */
export function idByContent(): { of(content: unknown): string; done(): void } {
  let [id, sent] = [uuidv7(), '']
  const done = () => void ([id, sent] = [uuidv7(), ''])
  return {
    of: (content) => {
      const text = JSON.stringify(content)
      if (sent !== '' && sent !== text) done()
      sent = text
      return id
    },
    done,
  }
}
