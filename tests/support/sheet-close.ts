import { expect } from 'vitest'

/** The tolerance of the calculation sheet: relative 1e-4 or absolute 1e-6, whichever is larger. */
export function expectClose(actual: unknown, expected: number, relative = 1e-4): void {
  expect(actual).toBeTypeOf('number')
  const tolerance = Math.max(1e-6, Math.abs(expected) * relative)
  const off = Math.abs((actual as number) - expected)
  expect(off, `${String(actual)} against ${expected}`).toBeLessThanOrEqual(tolerance)
}

/** Fails on NaN, and on Infinity unless allowed, anywhere inside a value. */
export function expectNumbersReal(value: unknown, { infinity = false } = {}): void {
  if (typeof value === 'number') {
    expect(Number.isNaN(value), 'NaN').toBe(false)
    if (!infinity) expect(Number.isFinite(value), 'Infinity').toBe(true)
  } else if (typeof value === 'object' && value !== null) {
    for (const part of Object.values(value)) expectNumbersReal(part, { infinity })
  }
}
