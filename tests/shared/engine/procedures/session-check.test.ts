import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { judgeSessionCheck, type ReferencePart } from '#shared/engine/procedures/session-check.ts'

const PART: ReferencePart = {
  id: 'golden',
  designation: 'FIX-91',
  for: 'analyzer',
  reads: 'SWR at 7.1 MHz',
  agreed: 1.5,
  tolerance: 0.05,
  unit: '',
}
const judged = (reading: number, part: Partial<ReferencePart> = {}) => {
  const judgement = judgeSessionCheck({ partId: 'golden', reading }, [{ ...PART, ...part }])
  if (isFailure(judgement)) throw new Error(judgement.message)
  return judgement
}

describe('an instrument against a reference part', () => {
  it('passes to the last digit of the tolerance, either way, and fails beyond it', () => {
    expect([1.45, 1.5, 1.55].map((reading) => judged(reading).finding)).toEqual(['pass', 'pass', 'pass'])
    expect([1.44, 1.56].map((reading) => judged(reading).finding)).toEqual(['fail', 'fail'])
  })

  it('says the reading, the part and what was agreed', () => {
    expect(judged(1.56).findings[0]).toMatchObject({
      measure: 'reference',
      value: 1.56,
      limit: '1.5 ± 0.05',
      text: 'reads 1.56 on FIX-91 (SWR at 7.1 MHz), agreed 1.5 ± 0.05',
    })
    expect(judged(49.2, { agreed: 50, tolerance: 1, unit: 'W', reads: '' }).findings[0]?.text).toBe(
      'reads 49.2 W on FIX-91, agreed 50 ± 1 W',
    )
  })

  it('is none against a part that is no reference', () => {
    expect(judgeSessionCheck({ partId: 'other', reading: 1 }, [PART])).toMatchObject({
      code: 'E_REFERENCE',
      field: 'partId',
    })
  })
})
