import Library from 'complex.js'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { add, divide, magnitude, multiply, subtract, type Complex } from '#shared/engine/complex.ts'

const part = fc.double({ min: -1e6, max: 1e6, noNaN: true })
const complex = fc.record({ re: part, im: part })

function expectClose(ours: Complex, theirs: { re: number; im: number }, size: number): void {
  expect(Math.abs(ours.re - theirs.re)).toBeLessThanOrEqual(1e-12 * size)
  expect(Math.abs(ours.im - theirs.im)).toBeLessThanOrEqual(1e-12 * size)
}

describe('complex arithmetic', () => {
  it('agrees with complex.js', () => {
    fc.assert(
      fc.property(complex, complex, (a, b) => {
        const size = Math.max(magnitude(a), magnitude(b), 1)
        const library = new Library(a)
        expectClose(add(a, b), library.add(b), size)
        expectClose(subtract(a, b), library.sub(b), size)
        expectClose(multiply(a, b), library.mul(b), size * size)
        fc.pre(magnitude(b) > 1e-3)
        expectClose(divide(a, b), library.div(b), magnitude(a) / magnitude(b) + 1e-9)
      }),
    )
  })

  it('divides very large and very small values without overflow', () => {
    expect(divide({ re: 1e300, im: 1e300 }, { re: 1e300, im: 1e300 })).toEqual({ re: 1, im: 0 })
    expect(divide({ re: 1e-300, im: 0 }, { re: 0, im: 1e-300 })).toEqual({ re: 0, im: -1 })
  })
})
