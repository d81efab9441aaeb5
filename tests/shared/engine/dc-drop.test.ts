import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { dcDrop, largestCurrentA, leadOhm, type DcDrop } from '#shared/engine/dc-drop.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('dcDrop', () => {
  // Calculation sheet, section 10.
  it.each([
    [10, 3, 20, 20, 13.2, 0, 0.393244, 12.8068, 2.97912, 'OK'],
    [12, 3, 20, 20, 13.2, 0.004, 0.705283, 12.4947, 5.34305, 'OK'],
    [14, 3, 20, 40, 12.6, 0.004, 1.15239, 11.4476, 9.14592, 'FAIL'],
    [12, 5, 22, 20, 12.4, 0.006, 1.27835, 11.1216, 10.3093, 'FAIL'],
    [10, 1.5, 22, 20, 13.2, 0.004, 0.304284, 12.8957, 2.30519, 'OK'],
  ])(
    'AWG %i, %f m, %i A at %i C from %f V, %f ohm',
    (gauge, lengthM, currentA, c, batteryV, ohm, dV, rV, pc, v) => {
      const lead = { gauge, lengthM, conductorC: c, contactsOhm: ohm }
      const drop = dcDrop(lead, { currentA, batteryV }) as DcDrop
      expectClose(drop.dropV, dV)
      expectClose(drop.radioV, rV)
      expectClose(drop.fraction * 100, pc)
      expect(drop.verdict).toBe(v)
    },
  )

  it('passes a radio at exactly its lowest voltage', () => {
    const lead = { gauge: 12, lengthM: 0, contactsOhm: 0.125 }
    expect(dcDrop(lead, { currentA: 8, batteryV: 12.75, lowestRadioV: 11.75 })).toMatchObject({
      verdict: 'OK',
    })
    expect(dcDrop(lead, { currentA: 8, batteryV: 12.75, lowestRadioV: 11.76 })).toMatchObject({
      verdict: 'FAIL',
    })
  })

  it('counts out and back, contacts of 0.004 ohm and 2 % for stranded wire', () => {
    expectClose(leadOhm({ gauge: 12, lengthM: 3 }), 6 * 5.21069e-3 + 0.004)
    expectClose(leadOhm({ gauge: 12, lengthM: 3, contactsOhm: 0, stranded: true }), 6 * 5.21069e-3 * 1.02)
  })

  it('refuses a length below 0 and a current the lead cannot carry', () => {
    expect(leadOhm({ gauge: 12, lengthM: -1 })).toMatchObject({ code: 'E_RANGE', field: 'lengthM' })
    const use = { currentA: 9000, batteryV: 13.2 }
    expect(dcDrop({ gauge: 12, lengthM: 3 }, use)).toMatchObject({ code: 'E_RANGE', field: 'currentA' })
    expect(dcDrop({ gauge: 50, lengthM: 3 }, use)).toMatchObject({ code: 'E_AWG' })
  })
})

describe('largestCurrentA', () => {
  // Calculation sheet, section 10.
  it.each([
    [12, 3, 12.8, 31.1931],
    [16, 2, 13.2, 26.4565],
  ])('AWG %i, %i m from %f V carries %f A', (gauge, lengthM, batteryV, largestA) => {
    expectClose(largestCurrentA({ gauge, lengthM }, { batteryV }), largestA)
  })

  it('is 0 for a battery at the lowest voltage and unknown without resistance', () => {
    expect(largestCurrentA({ gauge: 12, lengthM: 3 }, { batteryV: 11 })).toBe(0)
    expect(largestCurrentA({ gauge: 12, lengthM: 0, contactsOhm: 0 }, { batteryV: 13 })).toMatchObject({
      code: 'E_RANGE',
    })
  })

  it('answers any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.integer({ min: 0, max: 20 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, any, any, any, (gauge, lengthM, contactsOhm, currentA, batteryV) => {
        const lead = { gauge, lengthM, contactsOhm }
        expectNumbersReal([dcDrop(lead, { currentA, batteryV }), largestCurrentA(lead, { batteryV })])
      }),
    )
  })
})
