/**
 * What this device remembers until the next visit. Where its storage is full or refused, as in some private windows,
 * nothing is remembered and nothing breaks.
 */
export function readKept(key: string): string | null {
  try {
    return localStorage.getItem(key)
  } catch {
    return null
  }
}

/** As JSON; null also where what was kept cannot be read. */
export function readKeptJson(key: string): unknown {
  try {
    return JSON.parse(readKept(key) ?? 'null')
  } catch {
    return null
  }
}

/** Null forgets it. */
export function keep(key: string, text: string | null): void {
  try {
    if (text === null) localStorage.removeItem(key)
    else localStorage.setItem(key, text)
  } catch {
    // See above.
  }
}
