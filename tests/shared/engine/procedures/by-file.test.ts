/** Procedures that are read from an analyzer's file, against the check values of the calculation sheet. */
import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { filesWanted, judgePerformance } from '#shared/engine/procedures/judge-performance.ts'
import type { KnownForTest, Performance } from '#shared/engine/procedures/performance.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import {
  antennaFile,
  openLineFile,
  pairFile,
  strayOpen,
  termination,
  throughLineFile,
  TRANSFORMER,
} from '../../../support/sweep-files.ts'
import { valueOf } from '../../../support/value-of.ts'

const KNOWN: KnownForTest = {
  rule: undefined,
  instrument: null,
  battery: {},
  feedline: { baselineDb: {}, last: [] },
  line: {},
  transformer: {},
  sweep: { baseline: null },
  region: 'itu-2',
  plan: { positions: [], sealNumber: null },
  references: [],
}

const sourcesOf = (texts: Readonly<Record<string, string>>) =>
  Object.fromEntries(
    Object.entries(texts).map(([id, text]) => [id, { fileName: id, bytes: new TextEncoder().encode(text) }]),
  )

function judge(performance: Performance, texts: Record<string, string>, known: Partial<KnownForTest> = {}) {
  return judgePerformance(performance, sourcesOf(texts), { ...KNOWN, ...known })
}

const HF: Band[] = ['80 m', '40 m', '20 m', '15 m', '10 m']
const codes = (warnings: readonly { code: string }[]) => warnings.map(({ code }) => code)

describe('a pair by file', () => {
  const performance = (bands = HF): Performance => ({
    procedure: 'pair-loss',
    inputs: { source: 'file', file: 'pair.s2p', bands },
  })

  it('is graded on heat, with insertion loss beside it (sheet, section 3)', () => {
    const judged = valueOf(judge(performance(), { 'pair.s2p': pairFile() }))
    const rows = judged.results.bands as { lossDb: number; insertionLossDb: number; differenceDb: number }[]
    rows.forEach((row, at) => {
      expect(row.lossDb).toBeCloseTo(TRANSFORMER.points[at]!.pair.lossDb, 6)
      expect(row.insertionLossDb).toBeGreaterThan(row.lossDb)
      expect(row.differenceDb).toBeCloseTo(0, 9)
    })
    expect(judged.findings.map(({ band, measure }) => [band, measure])).toEqual(
      HF.map((band) => [band, 'efficiency']),
    )
    expect(judged.findings[0]?.uncertainty).toBeGreaterThan(0.01)
    expect(judged.findings[0]?.text).toMatch(/^84 % efficient \(± [\d.]+ %\) at 3.6 MHz, 0.78 dB lost$/)
  })

  it('is marginal where the limit lies within the uncertainty of the analyzer', () => {
    const files = { 'pair.s2p': pairFile() }
    const rule = { limits: { minEfficiency: 0.83 } }
    expect(valueOf(judge(performance(['80 m']), files, { rule })).finding).toBe('marginal')
    const instrument = { reflectionError: 0.001 }
    expect(valueOf(judge(performance(['80 m']), files, { rule, instrument })).finding).toBe('pass')
  })

  it('says when the two directions differ', () => {
    const judged = valueOf(judge(performance(['40 m']), { 'pair.s2p': pairFile(0.9) }))
    expect(codes(judged.warnings)).toEqual(['W_NOT_RECIPROCAL', 'W_NOT_ALIKE'])
    expect(judged.warnings[0]?.message).toMatch(/^40 m: /)
    const [row] = judged.results.bands as {
      differenceDb: number
      forwardLossDb: number
      reverseLossDb: number
    }[]
    expect(row!.reverseLossDb - row!.forwardLossDb).toBeCloseTo(-row!.differenceDb, 9)
  })

  it('refuses by name a band that the file does not reach, and a file of one port', () => {
    expect(judge(performance(['40 m', '2 m']), { 'pair.s2p': pairFile() })).toMatchObject({
      code: 'E_NO_TEST_FOR_BAND',
      field: 'bands',
      message: expect.stringContaining('2 m') as string,
    })
    expect(judge(performance(), { 'pair.s2p': termination('open') })).toMatchObject({
      code: 'TS_PORTS',
    })
    expect(judge(performance(), {})).toMatchObject({ code: 'E_FILE', field: 'file' })
  })

  it('names file and line of what cannot be read', () => {
    const refused = judge(performance(), { 'pair.s2p': '# MHz S RI R 50\n7 nonsense\n' })
    expect(refused).toMatchObject({ code: 'TS_NUMBER', field: 'file' })
    expect(isFailure(refused) && refused.message).toMatch(/^pair\.s2p, line 2: /)
  })
})

describe('an open, short and load sweep', () => {
  const FILES = { o: termination('open'), s: termination('short'), l: termination('load') }
  const performance = (fields: object = {}): Performance => ({
    procedure: 'open-short-load',
    inputs: { open: 'o', short: 's', load: 'l', loadOhm: 2450, openStrayPf: 0, bands: HF, ...fields },
  })

  it('gives the efficiency of the sheet on every band, with its uncertainty (section 4)', () => {
    const judged = valueOf(judge(performance(), FILES))
    judged.findings.forEach(({ value }, at) =>
      expect(value).toBeCloseTo(TRANSFORMER.points[at]!.efficiency, 6),
    )
    // The sheet's u(efficiency) for an error of 0.01, doubled: k = 2.
    const published = [0.00857051, 0.00810513, 0.00880068, 0.0102534, 0.0123786]
    judged.findings.forEach(({ uncertainty }, at) => expect(uncertainty).toBeCloseTo(2 * published[at]!, 4))
    expect(judged.finding).toBe('pass')
  })

  it('notices open and short swapped, which leaves the efficiency as it is', () => {
    const judged = valueOf(judge(performance({ open: 's', short: 'o' }), FILES))
    expect(codes(judged.warnings)).toContain('W_SWAPPED')
    expect(judged.findings[0]?.value).toBeCloseTo(TRANSFORMER.points[0]!.efficiency, 6)
  })

  it('refuses a load in the place of another, and one trace given twice', () => {
    expect(judge(performance({ open: 'l', load: 'o' }), FILES)).toMatchObject({
      code: 'E_SWAPPED',
      field: 'load',
    })
    expect(judge(performance(), { ...FILES, s: FILES.o })).toMatchObject({ code: 'E_SAME_TRACE' })
  })

  it('refuses by its name a standard that cannot be right', () => {
    // 2 pF on the open alone turns 0.84 into 1.12 at 28.4 MHz (sheet, section 4).
    const stray = { ...FILES, o: strayOpen(2) }
    const refused = judge(performance(), stray)
    expect(refused).toMatchObject({ code: 'E_NOT_PHYSICAL', field: 'bands' })
    expect(isFailure(refused) && refused.message).toMatch(/^10 m: .*standard/)
    const without = valueOf(judge(performance({ bands: ['80 m', '15 m'] }), stray))
    expect(codes(without.warnings)).toContain('W_STANDARD')
    expect(without.findings.map(({ value }) => value)).toEqual([
      expect.closeTo(0.82966, 4),
      expect.closeTo(0.996354, 4),
    ])
    const corrected = valueOf(judge(performance({ openStrayPf: 2 }), stray))
    expect(corrected.findings[4]?.value).toBeCloseTo(TRANSFORMER.points[4]!.efficiency, 5)
  })

  it('doubts a load that the turns do not ask for', () => {
    const transformer = { turnsPrimary: 3, turnsSecondary: 24 }
    const judged = valueOf(judge(performance({ loadOhm: 2450 }), FILES, { transformer }))
    expect(judged.warnings).toMatchObject([
      { code: 'W_LOAD_OHM', message: expect.stringContaining('3200') as string },
    ])
    const fitting = { turnsPrimary: 2, turnsSecondary: 14 }
    expect(valueOf(judge(performance(), FILES, { transformer: fitting })).warnings).toEqual([])
  })
})

describe('an antenna by file', () => {
  const BASE = { ohm: 45, q: 11, mhz: 7.12 }
  const NEW = { ohm: 52, q: 10, mhz: 7.03 }
  const performance = (fields: object = {}): Performance => ({
    procedure: 'antenna-sweep',
    inputs: { source: 'file', file: 'new.s1p', bands: ['40 m'], setsBaseline: false, ...fields },
  })
  const baseline = (file: string | null) => ({
    baseline: {
      testId: 'earlier',
      performedOn: '2026-01-01',
      file,
      worst: [{ band: '40 m' as const, frequencyMHz: 7.3, swr: 1.6915 }],
    },
  })

  it('is judged at the worst of the whole band (sheet, section 7)', () => {
    const judged = valueOf(judge(performance(), { 'new.s1p': antennaFile(NEW, [6.8, 7.5, 0.05]) }))
    expect(judged.findings[0]?.value).toBeCloseTo(2.12127, 4)
    expect(judged.findings[0]?.text).toBe('SWR 2.12 at 7.3 MHz')
    expect(judged.results.resonances).toMatchObject([{ frequencyMHz: 7.05 }])
    // d (s + 1)^2 / 2 for an error of 0.01, doubled.
    expect(judged.findings[0]?.uncertainty).toBeCloseTo(0.01 * 3.12127 ** 2, 4)
  })

  it('is judged at its working points where they are named', () => {
    const workingPoints = [{ band: '40 m', frequencyMHz: 7.05 }]
    const judged = valueOf(judge(performance({ workingPoints }), { 'new.s1p': antennaFile(NEW) }))
    expect(judged.findings[0]).toMatchObject({ finding: 'pass', text: 'SWR 1.07 at 7.05 MHz' })
    const outside = [{ band: '40 m', frequencyMHz: 7.9 }]
    expect(judge(performance({ workingPoints: outside }), { 'new.s1p': antennaFile(NEW) })).toMatchObject({
      code: 'E_GRID',
      field: 'workingPoints',
    })
  })

  it('is compared with its baseline point by point (sheet, section 7)', () => {
    const grid = [6.8, 7.5, 0.05] as const
    const files = { 'new.s1p': antennaFile(NEW, grid), 'base.s1p': antennaFile(BASE, grid) }
    const { results, warnings } = valueOf(judge(performance(), files, { sweep: baseline('base.s1p') }))
    const { bands } = results.drift as { bands: { largestSwrChange: number; rmsMagnitudeChange: number }[] }
    expect(bands[0]?.largestSwrChange).toBeCloseTo(0.429772, 4)
    expect(bands[0]?.rmsMagnitudeChange).toBeCloseTo(0.100789, 4)
    expect(warnings).toEqual([])
    expect(filesWanted(performance(), { sweep: baseline('base.s1p') })).toEqual(['new.s1p', 'base.s1p'])
  })

  it('that sets a baseline is compared with none', () => {
    const files = { 'new.s1p': antennaFile(NEW) }
    const known = { sweep: baseline(null) }
    expect(valueOf(judge(performance({ setsBaseline: true }), files, known)).results.drift).toBeUndefined()
    expect(valueOf(judge(performance(), files, known)).results.drift).toBeDefined()
  })

  it('says which working points it left out, because their band is not judged', () => {
    const workingPoints = [
      { band: '40 m', frequencyMHz: 7.1 },
      { band: '15 m', frequencyMHz: 21.1 },
    ]
    const { warnings } = valueOf(judge(performance({ workingPoints }), { 'new.s1p': antennaFile(NEW) }))
    expect(warnings).toEqual([
      {
        code: 'W_LEFT_OUT',
        message: 'Working points on 15 m: left out, because that is no band to be judged. Choose it as well.',
      },
    ])
  })

  it('of a part of the band says so, and of none is refused', () => {
    const part = valueOf(judge(performance(), { 'new.s1p': antennaFile(NEW, [6.8, 7.2, 0.01]) }))
    expect(codes(part.warnings)).toEqual(['W_PARTIAL_BAND'])
    expect(judge(performance({ bands: ['20 m'] }), { 'new.s1p': antennaFile(NEW) })).toMatchObject({
      code: 'E_NO_TEST_FOR_BAND',
    })
  })

  it('with a total reflection fails without a figure, and above one is refused at its frequency', () => {
    const open = '# MHz S RI R 50\n7 1 0\n7.1 1 0\n7.3 1 0\n'
    expect(valueOf(judge(performance(), { 'new.s1p': open })).findings[0]).toMatchObject({
      finding: 'fail',
      value: null,
    })
    const active = judge(performance(), { 'new.s1p': '# MHz S RI R 50\n7 0.1 0\n7.1 1.2 0\n' })
    expect(active).toMatchObject({ code: 'E_ACTIVE', field: 'file' })
    expect(isFailure(active) && active.message).toMatch(/^At 7.1 MHz: /)
  })
})

describe('an antenna by hand', () => {
  it('that is better on every band, most on the highest, is suspicious', () => {
    const worst = [
      { band: '40 m' as const, frequencyMHz: 7.3, swr: 2 },
      { band: '20 m' as const, frequencyMHz: 14.35, swr: 2.2 },
    ]
    const sweep = { baseline: { testId: 'earlier', performedOn: '2026-01-01', file: null, worst } }
    const points = (swr40: number, swr20: number) => [
      { band: '40 m' as const, frequencyMHz: 7.3, swr: swr40 },
      { band: '20 m' as const, frequencyMHz: 14.35, swr: swr20 },
    ]
    const performance = (swr40: number, swr20: number): Performance => ({
      procedure: 'antenna-sweep',
      inputs: { points: points(swr40, swr20) },
    })
    expect(codes(valueOf(judge(performance(1.8, 1.6), {}, { sweep })).warnings)).toEqual(['W_LINE_LOSS'])
    expect(valueOf(judge(performance(1.8, 2.3), {}, { sweep })).warnings).toEqual([])
  })
})

describe('a feedline by file', () => {
  const performance = (fields: object = {}): Performance => ({
    procedure: 'feedline-loss',
    inputs: { source: 'file', file: 'line', bands: ['2 m'], farEnd: 'open', setsBaseline: false, ...fields },
  })
  const feedline = { baselineDb: { '2 m': 1.4 }, baselineSwr: { '2 m': 2 }, last: [] }

  it('says which SWR at the radio it left out, because its band is not judged', () => {
    const swrAtRadio = [{ band: '70 cm', swr: 1.5 }]
    const { warnings } = valueOf(judge(performance({ swrAtRadio }), { line: openLineFile(1.9) }))
    expect(warnings.map(({ message }) => message)).toContain(
      'SWR at the radio on 70 cm: left out, because that is no band to be judged. Choose it as well.',
    )
  })

  it('with an open end is half its return loss, and through is its whole loss', () => {
    const open = valueOf(judge(performance(), { line: openLineFile(1.9) }, { feedline }))
    expect(open.findings[0]).toMatchObject({ finding: 'pass', measure: 'lossDb' })
    expect(open.findings[0]?.value).toBeCloseTo(1.9, 9)
    const through = valueOf(
      judge(performance({ farEnd: 'second-port' }), { line: throughLineFile(2.6) }, { feedline }),
    )
    expect(through.findings[0]?.value).toBeCloseTo(2.6, 9)
    expect(through.findings[0]?.finding).toBe('fail')
  })

  it('is asked how the far end was when the file says otherwise', () => {
    expect(judge(performance(), { line: throughLineFile(1) })).toMatchObject({
      code: 'TS_PORTS',
      field: 'farEnd',
    })
    expect(judge(performance({ farEnd: 'second-port' }), { line: openLineFile(1) })).toMatchObject({
      code: 'TS_PORTS',
      field: 'farEnd',
    })
  })

  it('that lost more while the SWR at the radio got better may be wet', () => {
    const swrAtRadio = [{ band: '2 m', swr: 1.7 }]
    const judged = valueOf(judge(performance({ swrAtRadio }), { line: openLineFile(2) }, { feedline }))
    expect(codes(judged.warnings)).toEqual(['W_WET_LINE'])
    expect(judged.results.readings).toMatchObject([{ band: '2 m', swrAtRadio: 1.7 }])
  })

  it('is compared with new cable of its kind and length (sheet, section 8)', () => {
    const line = { cable: 'rg-8x', lengthM: 15 }
    const through = { line: throughLineFile(2.5, [145.9, 146, 146.1]) }
    const judged = valueOf(judge(performance({ farEnd: 'second-port' }), through, { line }))
    const [row] = judged.results.againstNew as { newDb: number; aboveNewDb: number }[]
    expect(row?.newDb).toBeCloseTo(2.19773, 2)
    expect(row?.aboveNewDb).toBeCloseTo(0.3, 1)
  })
})
