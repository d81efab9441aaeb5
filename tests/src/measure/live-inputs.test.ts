import { describe, expect, it } from 'vitest'
import { failurePath } from '@/measure/failure-path.ts'
import { liveInputs } from '@/measure/live-inputs.ts'

const points = (...list: object[]) => ({ points: list })
const whole = { band: '40 m', frequencyMHz: 7.1, swr: 1.4 }

describe('what can be judged of a half-filled form', () => {
  it('is all of it when it is complete, with what the contract fills in', () => {
    const live = liveInputs('antenna-sweep', points(whole))
    expect(live).toMatchObject({
      status: 'complete',
      leftOut: 0,
      inputs: { points: [whole], conditions: '' },
    })
  })

  it('leaves out rows that are not finished, and finds the others again', () => {
    const live = liveInputs(
      'antenna-sweep',
      points({ band: '80 m', swr: 2 }, whole, { band: '20 m', frequencyMHz: 14 }),
    )
    expect(live).toMatchObject({
      status: 'complete',
      leftOut: 2,
      places: { points: [1] },
      inputs: { points: [whole] },
    })
    expect(live.faults.size).toBe(0)
  })

  it('is nothing while no row is finished, without a fault', () => {
    expect(liveInputs('antenna-sweep', points({ band: '40 m', swr: 1.4 }))).toEqual({
      status: 'incomplete',
      faults: new Map(),
    })
    expect(liveInputs('antenna-sweep', points())).toMatchObject({ status: 'incomplete' })
  })

  it('names the field that holds what cannot be', () => {
    const live = liveInputs(
      'antenna-sweep',
      points({ ...whole, swr: 0.5 }, { ...whole, frequencyMHz: '7,1,0' }),
    )
    expect([...live.faults]).toEqual([
      ['inputs/points/0/swr', 'Use 1 or more.'],
      ['inputs/points/1/frequencyMHz', 'Use a number, such as 12 or 0.5.'],
    ])
  })

  it('says why a voltage is no capacity', () => {
    const live = liveInputs('battery-capacity', { restingV: 12.9, cutOffV: 10.5, temperatureC: 20 })
    expect(live).toMatchObject({ status: 'incomplete' })
  })
})

describe('the field that the engine found at fault', () => {
  it('is the row on the screen, also when rows before it were left out', () => {
    const failure = { code: 'E_GAIN', message: 'more out than in', field: 'outW', line: 2 }
    expect(failurePath('pair-loss', failure, { bands: [0, 2] })).toBe('inputs/bands/2/outW')
    expect(failurePath('pair-loss', failure, {})).toBe('inputs/bands/1/outW')
  })

  it('is a field of the inputs, or none', () => {
    expect(failurePath('open-short-load', { code: 'E', message: '', field: 'load' }, {})).toBe('inputs/load')
    expect(failurePath('heat-test', { code: 'E_TOO_FEW', message: '' }, {})).toBeNull()
  })
})
