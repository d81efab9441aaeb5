import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { MOST_READINGS, readThermometerLog, type LogAnswers } from '@/measure/thermometer-log.ts'

function read(source: string | Uint8Array, answers?: LogAnswers) {
  const log = readThermometerLog(source, answers)
  if (isFailure(log)) throw new Error(log.message)
  return log
}

const pairs = (source: string, answers?: LogAnswers) =>
  read(source, answers).readings.map(({ atS, temperatureC }) => [atS, temperatureC])

const RISE = [
  [0, 22],
  [60, 31.5],
  [120, 39],
]

describe('a log from a thermometer', () => {
  it.each([
    ['seconds and a heading', 'Time (s),Temperature (°C)\n0,22.0\n60,31.5\n120,39.0\n'],
    ['minutes', 'Elapsed min,Probe °C\n0,22\n1,31.5\n2,39'],
    ['minutes and seconds', 'Time,Temp C (C)\n0:00,22\n1:00,31.5\n2:00,39'],
    ['clock times', 'Time;Temp °C\n10:59:30;22,0\n11:00:30;31,5\n11:01:30;39,0\n'],
    ['a clock that passes midnight', 'Time,Temp °C\n23:59:00,22\n00:00:00,31.5\n00:01:00,39'],
    ['AM and PM', 'Time,°C\n11:59:00 AM,22\n12:00:00 PM,31.5\n12:01:00 PM,39'],
    [
      'a date and a time in one cell',
      'Timestamp,°C\n2026-05-02 10:00:00,22\n2026-05-02T10:01:00Z,31.5\n2026-05-02 10:02,39',
    ],
    [
      'a date and a time beside it',
      'Date,Time,Temperature [C]\n5/2/2026,10:00:00,22\n5/2/2026,10:01:00,31.5\n5/2/2026,10:02:00,39',
    ],
    [
      'days before months',
      'Date,Time,°C\n31/01/2026,23:59:00,22\n01/02/2026,00:00:00,31.5\n01/02/2026,00:01:00,39',
    ],
    ['units in the cells', '0,22 °C\n60,31.5 °C\n120,39 °C'],
    [
      'lines about the logger first',
      'Logger;L-2\nSerial;123\n\nNo.;Time;Temp1 °C;Alarm high\n1;10:00:00;22,0;85\n2;10:01:00;31,5;85\n3;10:02:00;39,0;85',
    ],
    ['tabs, a byte-order mark and CRLF', '\uFEFFTime s\tT1 °C\r\n0\t22\r\n60\t31.5\r\n120\t39\r\n'],
  ])('with %s is read', (_what, source) => {
    expect(pairs(source)).toEqual(RISE)
  })

  it('in °F comes out in °C', () => {
    expect(pairs('Time s,Temp °F\n0,72\n60,212')).toEqual([
      [0, 22.222],
      [60, 100],
    ])
  })

  it('that does not say its unit asks for it, and takes the answer', () => {
    const source = 'Time s,Temp\n0,72\n60,80'
    expect(readThermometerLog(source)).toMatchObject({ code: 'E_UNIT' })
    expect(read(source, { unit: 'F' }).readings[0]?.temperatureC).toBeCloseTo(22.222, 3)
    expect(pairs(source, { unit: 'C' })[0]).toEqual([0, 72])
  })

  it('with times such as 14:05 asks what they are, and takes the answer', () => {
    const source = 'Time,Temp °C\n14:05,22\n14:06,31.5\n14:07,39'
    expect(readThermometerLog(source)).toMatchObject({ code: 'E_TIMES' })
    expect(pairs(source, { times: 'of-day' })).toEqual(RISE)
    expect(pairs(source, { times: 'counting' }).map(([at]) => at)).toEqual([0, 1, 2])
  })

  it.each([
    ['a heading of hours and minutes', 'Time (hh:mm),°C\n14:05,22\n14:06,31.5\n14:07,39'],
    ['a heading of a clock', 'Clock time,°C\n23:59,22\n00:00,31.5\n00:01,39'],
    ['a heading of time that elapsed', 'Elapsed time,°C\n5:00,22\n6:00,31.5\n7:00,39'],
    ['minutes past 23', 'Time,°C\n22:30,22\n23:30,31.5\n24:30,39'],
    ['a date beside them', 'Date,Time,°C\n2026-05-02,14:05,22\n2026-05-02,14:06,31.5\n2026-05-02,14:07,39'],
  ])('with such times and %s needs no answer', (_what, source) => {
    expect(pairs(source)).toEqual(RISE)
  })

  it('with two probes reads the first, or the one that is asked for', () => {
    const source = 'Time s,T1 °C,T2 °C\n0,22,20\n60,30,21'
    expect(read(source).columns.map(({ name }) => name)).toEqual(['T1 °C', 'T2 °C'])
    expect(pairs(source, { column: 2 })).toEqual([
      [0, 20],
      [60, 21],
    ])
  })

  it('that is too long is thinned evenly, first, last and hottest kept', () => {
    const lines = Array.from({ length: 2001 }, (_, n) => `${n},${n === 777 ? 91 : 30}`)
    const { readings, lines: all } = read(`Time s,°C\n${lines.join('\n')}`)
    expect(all).toBe(2001)
    expect(readings.length).toBeLessThanOrEqual(MOST_READINGS)
    expect([readings[0]?.atS, readings.at(-1)?.atS]).toEqual([0, 2000])
    expect(readings.some(({ temperatureC }) => temperatureC === 91)).toBe(true)
  })
})

describe('a log with a fault', () => {
  it('names line and column of each, and takes nothing over', () => {
    const log = readThermometerLog('Time s,Temp °C\n0,22\n60,---\nlater,31')
    expect(log).toMatchObject({
      code: 'E_LOG_LINE',
      line: 3,
      faults: [
        { line: 3, column: 'Temp °C' },
        { line: 4, column: 'time', message: expect.stringContaining('“later”') },
      ],
    })
  })

  it.each([
    ['times that stand still', 'Time s,°C\n0,22\n60,23\n60,24', 'E_LOG_LINE', 4],
    ['a temperature no probe has', 'Time s,°C\n0,22\n60,850', 'E_LOG_LINE', 3],
    ['one reading', 'Time s,°C\n0,22', 'E_TOO_FEW', undefined],
    ['no table', 'hello\nworld', 'E_LOG_COLUMNS', undefined],
    ['nothing', '', 'E_LOG_COLUMNS', undefined],
  ])('of %s is refused', (_what, source, code, line) => {
    expect(readThermometerLog(source)).toMatchObject({ code, ...(line && { line }) })
  })

  it('leave the choice of another column open', () => {
    const source = 'Time s,Probe 1 °C,Probe 2 °C\n0,22,---\n60,31,---'
    const log = readThermometerLog(source, { column: 2 })
    expect(log).toMatchObject({ code: 'E_LOG_LINE', columns: [{ place: 1 }, { place: 2 }] })
    expect(log).toMatchObject({ message: expect.stringMatching(/ 1 more line has a fault\.$/) })
  })

  it('of bytes that are no text, or too many, is refused', () => {
    expect(readThermometerLog(new Uint8Array([0xff, 0xfe, 0x41, 0]))).toMatchObject({
      code: 'E_LOG_ENCODING',
    })
    expect(readThermometerLog('x'.repeat(3_000_000))).toMatchObject({ code: 'E_LOG_SIZE' })
    const rows = Array.from({ length: 6000 }, (_, n) => `${n},22`).join('\n')
    expect(readThermometerLog(`Time s,°C\n${rows}`)).toMatchObject({ code: 'E_LOG_SIZE' })
  })
})
