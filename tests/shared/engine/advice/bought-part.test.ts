import { describe, expect, it } from 'vitest'
import { boughtPart } from '#shared/engine/advice/bought-part.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { currentCheck } from '../readiness/support/evidence.ts'
import { itemIn, retested, withItem } from '../readiness/support/kits.ts'
import { TESTED_ON, VHF } from '../readiness/support/sample-kits.ts'

const RADIO = itemIn(VHF, 'radio').id
const unwritten = withItem(VHF, RADIO, { facts: { bands: ['2 m'] } })
const check = currentCheck(RADIO, { receiveA: 0.6, transmitA: 11, of: 'radio' }, TESTED_ON)
const measured = retested(unwritten, check)
const hours = (kit: KitState, promised: number) => ({ ...kit, promise: { ...kit.promise, hours: promised } })
const bought = (kit: KitState, category: string) =>
  boughtPart(
    kit,
    kit.positions.find((position) => position.category === category)!,
  ).facts

describe('a part that is bought', () => {
  it('draws what the radio before it was measured to draw', () => {
    expect(bought(measured, 'radio')).toMatchObject({ receiveA: 0.6, drawA: [{ amps: 11 }] })
    expect(bought(unwritten, 'radio')).not.toHaveProperty('drawA')
  })

  it('is a battery for the hours promised at the load measured: 2.68 A for 24 h of 70 %', () => {
    expect(bought(hours(measured, 24), 'battery').ratedAh).toBe(Math.ceil((24 * 2.68) / 0.7))
    expect(bought(hours(unwritten, 24), 'battery').ratedAh).toBe(50)
  })
})
