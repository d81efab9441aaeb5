import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import { swrTrace } from '#shared/engine/swr-trace.ts'
import {
  FIVE_MEANS,
  reflectionAnswer,
  reflectionLayout,
  reflectionTable,
} from '@/components/picture/reflection-picture.ts'
import type { RoleTrace } from '@/composables/useTraces.ts'
import { storedTest } from '../../../support/stored-test.ts'

function traceOf(role: RoleTrace['role'], text: string): RoleTrace {
  const file = readTouchstone(text, { fileName: `${role}.s1p` })
  const trace = isFailure(file) ? file : swrTrace(file)
  if (isFailure(trace)) throw new Error(trace.message)
  return { role, ...trace }
}

// Calculation sheet, section 4, inputs of the check values.
const OPEN =
  '# MHz S RI R 50\n3.6 0.5295946583 0.4378698442\n7.1 0.6494990649 -0.0969180877\n28.4 -0.2306124718 -0.8254021247\n'
const SHORT =
  '# MHz S RI R 50\n3.6 -0.9958734268 0.0464938204\n7.1 -0.9919807021 0.0921805793\n28.4 -0.8878037291 0.4085862989\n'
const TRACES = [traceOf('open', OPEN), traceOf('short', SHORT)]

const test = (open: number) => ({
  ...storedTest({ procedure: 'inspection', inputs: { serviceable: true, found: '' } }),
  procedure: 'open-short-load' as const,
  results: {
    bands: [
      { band: '40 m', frequencyHz: 7.1e6, swr: { open, short: 532.97, load: 1.2 } },
      { band: '10 m', frequencyHz: 28.4e6, swr: { open: 12.99, short: null, load: 2.55 } },
    ],
  },
})

describe('the traces of open, short and load', () => {
  it('have the SWR of the calculation sheet, section 4', () => {
    expect([...TRACES[0]!.swr].map((swr) => Number(swr.toFixed(4)))).toEqual([5.3932, 4.8256, 12.9873])
    expect(TRACES[1]!.swr[1]).toBeCloseTo(532.97, 1)
  })

  it('take a reflection beyond a total one for a total one', () => {
    expect([...traceOf('open', '# MHz S RI R 50\n1 1.2 0\n2 1 0\n').swr]).toEqual([Infinity, Infinity])
  })

  it('are told by the trade’s line, and what that line is worth is said beside it', () => {
    expect(reflectionAnswer(test(4.8))).toContain('falls below 5 on 40 m')
    expect(reflectionAnswer(test(6))).toContain('stays above 5 on every band')
    // Calculation sheet, section 4: SWR 5 is 0.791812 dB as a shunt loss, 1.76091 dB as an attenuator.
    expect(FIVE_MEANS).toContain('about 0.8 dB lost and not 1.8')
  })

  it('write a total reflection in words in their table', () => {
    expect(reflectionTable(test(6)).rows[1]!.cells[3]).toBe('beyond all measure')
  })

  it('stay within the picture, up to a total reflection, with their words apart', () => {
    const at = reflectionLayout(test(6), TRACES, { width: 358, height: 340, narrow: true })
    for (const { points } of at.lines)
      for (const [x, y] of points) {
        expect(x).toBeGreaterThanOrEqual(at.left)
        expect(x).toBeLessThanOrEqual(at.right)
        expect(y).toBeGreaterThanOrEqual(at.top)
        expect(y).toBeLessThanOrEqual(at.foot)
      }
    const [a, b] = at.lines.map(({ labelY }) => labelY)
    expect(Math.abs(a! - b!)).toBeGreaterThanOrEqual(18)
    expect(at.zones.map(({ band }) => band)).toEqual(['40 m', '10 m'])
  })
})
