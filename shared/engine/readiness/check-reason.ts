import type { Band, Procedure } from '../vocabulary.ts'
import { reasonOf } from './reason.ts'
import { testAction } from './actions.ts'
import { doubtText, lapsedText, neverText, raisedText } from './sentences.ts'
import type { Standing } from './standing.ts'
import type { Reason, ReasonLevel } from './period-types.ts'

interface Subject {
  readonly name: string
  readonly itemId: string | null
  readonly positionId: string | null
}

/** The reason that a check without a good result gives; undefined for a good or a failed one. */
export function reasonForStanding(
  subject: Subject,
  check: { readonly procedure: Procedure; readonly band: Band | null; readonly level: ReasonLevel },
  standing: Standing,
): Reason | undefined {
  const text = standingText(subject.name, check.procedure, check.band, standing)
  if (text === undefined) return undefined
  return reasonOf({
    code: `${check.procedure}-${standing.state}`,
    level: check.level,
    text,
    band: check.band,
    itemId: subject.itemId,
    positionId: subject.positionId,
    testId: standing.test?.id ?? null,
    procedure: check.procedure,
    action: testAction(subject.name, check.procedure, check.band),
  })
}

function standingText(
  name: string,
  procedure: Procedure,
  band: Band | null,
  { state, test, doubt, raised }: Standing,
): string | undefined {
  if (state === 'good' || state === 'failed') return undefined
  if (doubt) return doubtText(name, procedure, doubt, band)
  if (raised) return raisedText(name, raised)
  if (state === 'lapsed' && test) return lapsedText(name, test.procedure, test.performedOn, band)
  return neverText(name, procedure, band)
}
