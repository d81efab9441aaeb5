import { describe, expect, it } from 'vitest'
import { areaPath, linePath, thinned, type Point } from '@/components/chart/paths.ts'
import { spread } from '@/components/chart/spread.ts'

describe('paths', () => {
  it('join points, and one point is no line', () => {
    expect(
      linePath([
        [0, 1],
        [2, 3.25],
      ]),
    ).toBe('M0.0 1.0L2.0 3.3')
    expect(linePath([[0, 1]])).toBe('')
  })

  it('go out along the upper line and back along the lower one', () => {
    expect(
      areaPath(
        [
          [0, 1],
          [5, 2],
        ],
        [
          [0, 8],
          [5, 9],
        ],
      ),
    ).toBe('M0.0 1.0L5.0 2.0L5.0 9.0L0.0 8.0Z')
  })

  it('of many points keep every spike', () => {
    const points = Array.from({ length: 10_001 }, (_, i): Point => [
      i / 25,
      i === 5003 ? -40 : Math.sin(i / 400),
    ])
    const kept = thinned(points)
    expect(kept.length).toBeLessThanOrEqual(4 * 401)
    expect(kept.some(([, y]) => y === -40)).toBe(true)
    expect(kept.at(-1)).toEqual(points.at(-1))
    expect(kept.every(([x], index) => index === 0 || x >= kept[index - 1]![0])).toBe(true)
  })
})

describe('labels beside lines', () => {
  it('stay where they are when there is room', () => {
    expect(spread([10, 80, 40], 15, 0, 100)).toEqual([10, 80, 40])
  })

  it('move apart and keep their order', () => {
    expect(spread([50, 51, 52], 15, 0, 200)).toEqual([50, 65, 80])
  })

  it('stay within the picture', () => {
    expect(spread([95, 96, 200], 15, 0, 100)).toEqual([70, 85, 100])
  })
})
