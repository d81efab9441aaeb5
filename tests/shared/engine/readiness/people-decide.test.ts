import { describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Decision, KitState } from '#shared/engine/readiness/types.ts'
import type { Verdict } from '#shared/engine/vocabulary.ts'
import { lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { at } from './support/instants.ts'
import { withKit, withoutItem, withoutTests } from './support/kits.ts'
import { HF, SOON } from './support/sample-kits.ts'

const FROM = at('2026-06-10 09:00')
const UNTIL = at('2026-06-20 18:00')

const decided = (part: Partial<Decision>, kit: KitState = HF): KitState => ({
  ...kit,
  decisions: [
    {
      id: 'decision',
      kind: 'lowered',
      toVerdict: 'not-proven',
      reason: 'smells burnt',
      by: 'Ines Calderwick',
      from: FROM,
      until: UNTIL,
      ...part,
    },
  ],
})
const unproven = withoutTests(HF, ({ procedure }) => procedure === 'count')

describe('a lowered verdict', () => {
  it('holds from its first instant to its last', () => {
    const kit = decided({})
    const verdicts = [FROM - 1, FROM, UNTIL - 1, UNTIL].map((when) => verdictAt(kit, when))
    expect(verdicts).toEqual(['proven', 'not-proven', 'not-proven', 'proven'])
  })

  it('makes its ends boundaries of the timeline', () => {
    const starts = kitTimeline(decided({}), at('2026-06-05')).map(({ from }) => from)
    expect(starts.slice(0, 3)).toEqual([at('2026-06-05'), FROM, UNTIL])
  })

  it('lasts when it has no end', () => {
    expect(verdictAt(decided({ until: null }), UNTIL)).toBe('not-proven')
  })

  it('says who lowered it, and why', () => {
    const [reason] = lowering(periodAt(decided({}), FROM))
    expect(reason?.text).toMatch(/Ines Calderwick.*smells burnt/)
    expect(reason?.action?.kind).toBe('decide')
  })

  const TO: [to: Verdict, kit: KitState, verdict: Verdict][] = [
    ['proven-with-limits', HF, 'proven-with-limits'],
    ['not-proven', HF, 'not-proven'],
    ['not-fit', HF, 'not-fit'],
    ['proven-with-limits', unproven, 'not-proven'],
    ['not-fit', unproven, 'not-fit'],
    ['not-proven', withoutItem(HF, 'ANT-90'), 'not-fit'],
  ]
  for (const [to, kit, verdict] of TO)
    it(`to ${to} never raises: ${verdictAt(kit, at(SOON))} becomes ${verdict}`, () => {
      expect(verdictAt(decided({ toVerdict: to }, kit), FROM)).toBe(verdict)
    })
})

describe('an accepted risk', () => {
  const accepted = decided(
    { kind: 'risk-accepted', toVerdict: null, reason: 'county exercise', by: 'Oona Kessleray' },
    unproven,
  )

  it('leaves the verdict as the evidence has it', () => {
    expect(verdictAt(accepted, FROM)).toBe('not-proven')
    expect(verdictAt(decided({ kind: 'risk-accepted', toVerdict: null }), FROM)).toBe('proven')
  })

  it('is shown by name, with its end, as a note', () => {
    const notes = periodAt(accepted, FROM).reasons.filter(({ level }) => level === 'note')
    expect(textsOf(notes).join()).toMatch(/Oona Kessleray.*county exercise/)
    expect(textsOf(notes).join()).toContain('20 Jun 2026')
  })

  it('is no longer shown after its end', () => {
    expect(textsOf(periodAt(accepted, UNTIL).reasons).join()).not.toContain('Oona')
    expect(textsOf(periodAt(accepted, FROM - 1).reasons).join()).not.toContain('Oona')
  })
})

describe('a seal', () => {
  it('that does not match leaves the kit not proven until it is counted', () => {
    const period = periodAt(withKit(HF, { sealMatches: false }), at(SOON))
    expect(period.verdict).toBe('not-proven')
    const [reason] = lowering(period)
    expect(reason?.text).toMatch(/seal/i)
    expect(reason?.action).toMatchObject({ kind: 'count' })
  })
})

describe('availability', () => {
  it.each(['available', 'assigned', 'out-of-service'] as const)(
    '%s does not change the verdict',
    (availability) => {
      const period = periodAt(withKit(HF, { availability }), at(SOON))
      expect(period).toMatchObject({ verdict: 'proven', availability })
    },
  )
})
