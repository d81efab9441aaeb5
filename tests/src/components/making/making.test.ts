import { describe, expect, it } from 'vitest'
import type { TestMaking } from '#shared/contracts/test-making.ts'
import { PROCEDURES } from '#shared/engine/vocabulary.ts'
import { CALCULATIONS } from '@/components/making/calculations.ts'
import { accuracyText, calibrationText } from '@/components/making/instrument-words.ts'
import { workingOf } from '@/components/making/working.ts'
import { quantityText } from '@/format/quantity.ts'
import { storedTest } from '../../../support/stored-test.ts'

const text = (value: number, unit: string, digits = 1) => quantityText(value, unit, digits)
const plain = (words: string) => words.replaceAll('\u00a0', ' ')
const lines = (test: Parameters<typeof workingOf>[0]) => workingOf(test, text).map(plain)

type Instrument = NonNullable<TestMaking['instrument']>

const instrument = (fields: Partial<Instrument>): Instrument => ({
  item: { id: 'i', designation: 'WTM-24', category: 'wattmeter' },
  accuracy: {},
  unit: 'W',
  calibration: { state: 'none', before: null, after: null, untilOn: null, check: null },
  ...fields,
})

describe('the way from readings to figures', () => {
  it('works a pair loss out as one would on paper', () => {
    const inputs = { meters: 'two' as const, bands: [{ band: '10 m' as const, inW: 50, outW: 27.38 }] }
    expect(lines(storedTest({ procedure: 'pair-loss', inputs }))).toEqual([
      '10 m: 50 W in, 27.38 W out. 10 log (50 / 27.38) = 2.62 dB for both, 1.31 dB for one. 10^(−1.31 / 10) = 74 %.',
    ])
  })

  it('says at which point of a file the band was judged', () => {
    const swept = storedTest({
      procedure: 'pair-loss',
      inputs: { meters: 'two', bands: [{ band: '10 m', inW: 50, outW: 27.38 }] },
    })
    const inputs = { source: 'file', bands: ['10 m'] }
    const results = { bands: [{ band: '10 m', lossDb: 1.31, efficiency: 0.74, frequencyHz: 29.7e6 }] }
    expect(lines({ ...swept, inputs, results })[0]).toBe(
      '10 m: 1.31 dB at 29.7 MHz, the worst point of the band. 10^(−1.31 / 10) = 74 %.',
    )
  })

  it('refers a capacity to 25 °C and divides it by the rating', () => {
    const inputs = { measuredAh: 20.54, currentA: 1.3, cutOffV: 10.5, temperatureC: 25 }
    const known = { battery: { ratedAh: 26, chemistry: 'agm' as const } }
    expect(lines(storedTest({ procedure: 'battery-capacity', inputs }, known))).toEqual([
      '20.54 Ah taken out at 25 °C; factor 1: 20.54 Ah at 25 °C.',
      '20.54 Ah / 26 Ah rated = 79 %.',
    ])
  })

  it('writes the fitted curve of a heat test, or why there is none', () => {
    const readings = [0, 1, 2, 3, 5, 8, 10].map((minute) => ({
      atS: minute * 60,
      temperatureC: Number((22 + 100 * (1 - Math.exp(-minute / 20))).toFixed(1)),
    }))
    const inputs = {
      band: '10 m' as const,
      powerW: 50,
      ambientC: 22,
      readings,
      keyUpAtS: 600,
      stoppedAtLimit: false,
    }
    const [rise, rate, curve] = lines(storedTest({ procedure: 'heat-test', inputs }))
    expect(rise).toBe('Highest while keyed 61.3 °C, ambient 22 °C: a rise of 39.3 K.')
    expect(rate).toBe('First to last reading: 3.93 K a minute over 10 min.')
    expect(curve).toMatch(/^T = 22 °C \+ \d+(\.\d)? K × \(1 − e\^\(−t \/ \d+(\.\d)? min\)\)\.$/)
    const few = readings.filter((_, at) => [0, 3, 6].includes(at))
    expect(
      lines(storedTest({ procedure: 'heat-test', inputs: { ...inputs, readings: few } })).at(-1),
    ).toContain('too short to say')
  })

  it('is empty where nothing is calculated, and every procedure has its calculation', () => {
    expect(lines(storedTest({ procedure: 'inspection', inputs: { serviceable: true, found: '' } }))).toEqual(
      [],
    )
    for (const procedure of PROCEDURES) {
      const { name, formulas, source } = CALCULATIONS[procedure]
      expect(
        [name, source, ...formulas].every((words) => words.length > 3),
        procedure,
      ).toBe(true)
    }
  })
})

describe('what the instrument could be trusted', () => {
  it('is its data sheet with units', () => {
    const accuracy = {
      accuracyPercentOfReading: 3,
      accuracyPercentOfFullScale: 1,
      fullScale: 200,
      resolution: 0.1,
    }
    expect(plain(accuracyText(instrument({ accuracy })))).toBe(
      '± 3 % of the reading, ± 1 % of full scale (200 W), steps of 0.1 W',
    )
  })

  it('is said not to be on record, with what to do', () => {
    expect(accuracyText(instrument({}))).toMatch(/^not on record: enter it/)
  })

  const before = { testId: 'b', performedOn: '2025-08-15', finding: 'pass' as const }
  it.each([
    ['in-date', null, 'In date that day: last calibrated on 15 Aug 2025, good until 15 Aug 2026.'],
    [
      'lapsed',
      null,
      'Lapsed that day: last calibrated on 15 Aug 2025, good until 15 Aug 2026. The figures are in doubt until it is calibrated again.',
    ],
    [
      'confirmed',
      'pass',
      'Shown to be right: last calibrated on 15 Aug 2025, good until 15 Aug 2026; calibrated again on 1 Sep 2026 and found good.',
    ],
    [
      'vouched',
      null,
      'Lapsed that day: last calibrated on 15 Aug 2025, good until 15 Aug 2026; a session check on 2 Sep 2026 vouches for it at one value.',
    ],
    [
      'check-failed',
      null,
      'Last calibrated on 15 Aug 2025, good until 15 Aug 2026; a session check failed on 2 Sep 2026, which puts these figures in doubt until a calibration shows otherwise.',
    ],
    [
      'failed',
      'fail',
      'Failed since: last calibrated on 15 Aug 2025, good until 15 Aug 2026; failed on 1 Sep 2026, which puts these figures in doubt.',
    ],
  ] as const)('says %s in a sentence', (state, next, sentence) => {
    const after = next && { testId: 'a', performedOn: '2026-09-01', finding: next }
    const check = { testId: 'c', performedOn: '2026-09-02', finding: 'pass' as const }
    const calibration = { state, before, after, untilOn: '2026-08-15', check }
    expect(calibrationText(instrument({ calibration }))).toBe(sentence)
  })
})
