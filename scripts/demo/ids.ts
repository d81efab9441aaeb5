import { createHash } from 'node:crypto'

const SEED = 'halyard demo 20261031'

/** Shaped like a UUIDv7: the time it was made, then bits that depend on the name alone. */
function idAt(at: Date, name: string): string {
  const time = at.getTime().toString(16).padStart(12, '0')
  const bits = createHash('sha256').update(`${SEED} ${time} ${name}`).digest('hex')
  const variant = ((Number.parseInt(bits.charAt(3), 16) & 3) | 8).toString(16)
  const parts = [
    time.slice(0, 8),
    time.slice(8),
    `7${bits.slice(0, 3)}`,
    variant + bits.slice(4, 7),
    bits.slice(7, 19),
  ]
  return parts.join('-')
}

/** Ids of the demo's things by name: made once, when the thing comes to be, and then looked up. */
export class Ids {
  readonly #made = new Map<string, string>()

  make(name: string, at: Date): string {
    if (this.#made.has(name)) throw new Error(`${name} was made before`)
    const id = idAt(at, name)
    this.#made.set(name, id)
    return id
  }

  of(name: string): string {
    const id = this.#made.get(name)
    if (id === undefined) throw new Error(`${name} is not there yet`)
    return id
  }

  /** Undefined while there is no such thing. */
  find(name: string): string | undefined {
    return this.#made.get(name)
  }
}
