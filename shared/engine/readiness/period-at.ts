import { VERDICTS, type Verdict } from '../vocabulary.ts'
import { SETTLE_ACTION } from './actions.ts'
import { judgeBands } from './bands.ts'
import { judgeEndurance } from './endurance.ts'
import { judgeKit } from './kit-checks.ts'
import { judgeModes } from './modes.ts'
import type { Moment } from './moment.ts'
import { reasonOf, sortReasons } from './reason.ts'
import { decisionText } from './sentences.ts'
import { fillPositions, positionReasons } from './slots.ts'
import type { Period, Reason } from './period-types.ts'
import type { Decision, Evidence } from './types.ts'
import { judgeItems } from './whole-checks.ts'

export type Judgement = Omit<Period, 'from' | 'to'>

/** The verdict at one instant with everything it rests on (design 4.3). */
export function judgementAt(moment: Moment): Judgement {
  const { state } = moment
  const filled = fillPositions(moment)
  const bands = judgeBands(moment, filled)
  const endurance = judgeEndurance(moment, filled)
  const modes = judgeModes(moment, filled)
  const items = judgeItems(moment, filled)
  const kit = judgeKit(moment, filled)
  const found = [
    positionReasons(filled),
    bands.reasons,
    kit.reasons,
    items.reasons,
    endurance.reasons,
    modes.reasons,
  ]
  const decisions = state.decisions.filter(
    (one) => one.from <= moment.at && (one.until === null || moment.at < one.until),
  )
  const reasons = sortReasons([...found.flat(), ...decisions.map((one) => decisionReason(moment, one))])
  return {
    verdict: verdictOf(reasons),
    availability: state.kit.availability,
    reasons,
    capability: {
      bands: bands.bands,
      modes: modes.modes,
      hours: endurance.hours,
      usableAh: endurance.usableAh,
      hoursFactors: endurance.factors,
      hoursConditions: endurance.conditions,
    },
    oldestVitalOn: oldestDay([...bands.tests, ...endurance.tests, ...items.tests, ...kit.tests]),
  }
}

const VERDICT_OF_LEVEL = {
  'not-fit': 'not-fit',
  'not-proven': 'not-proven',
  limit: 'proven-with-limits',
  note: 'proven',
} as const satisfies Record<Reason['level'], Verdict>

function verdictOf(reasons: readonly Reason[]): Verdict {
  const ranks = reasons.map(({ level }) => VERDICTS.indexOf(VERDICT_OF_LEVEL[level]))
  return VERDICTS[Math.max(0, ...ranks)]!
}

/** A person may lower a verdict, never raise one; an accepted risk is shown, with its end, and changes nothing. */
function decisionReason(moment: Moment, decision: Decision): Reason {
  const text = decisionText(decision, decision.until === null ? null : moment.dayOf(decision.until))
  if (decision.kind === 'risk-accepted') return reasonOf({ code: 'risk-accepted', level: 'note', text })
  const level = LEVEL_OF_VERDICT[decision.toVerdict ?? 'proven-with-limits']
  return reasonOf({ code: 'lowered', level, text, action: SETTLE_ACTION })
}

const LEVEL_OF_VERDICT = {
  'not-fit': 'not-fit',
  'not-proven': 'not-proven',
  'proven-with-limits': 'limit',
  proven: 'limit',
} as const satisfies Record<Verdict, Reason['level']>

function oldestDay(tests: readonly Evidence[]): string | null {
  return tests.reduce<string | null>(
    (oldest, { performedOn }) => (oldest === null || performedOn < oldest ? performedOn : oldest),
    null,
  )
}
