import type { Band, Procedure } from '../vocabulary.ts'
import type { Action, Period, Reason } from './period-types.ts'

/** One thing to do, and the reasons that it would lift. */
export interface Fix {
  readonly action: Action
  readonly reasons: readonly string[]
  readonly itemId: string | null
  readonly positionId: string | null
  readonly procedure: Procedure | null
  readonly band: Band | null
}

/** What would bring a kit back, smallest first; what nobody can put minutes to comes last. Notes ask for nothing. */
export function fixList(period: Pick<Period, 'reasons'>): Fix[] {
  const byAction = new Map<string, Reason[]>()
  for (const reason of period.reasons) {
    if (!reason.action || reason.level === 'note') continue
    // Replacing an item lifts all that is wrong with it; tests of several bands are one line each.
    const key = `${reason.action.kind} ${reason.action.text}`
    byAction.set(key, [...(byAction.get(key) ?? []), reason])
  }
  return [...byAction.values()].map(fixOf).sort((a, b) => minutesOf(a) - minutesOf(b))
}

function fixOf(reasons: readonly Reason[]): Fix {
  const [first] = reasons
  return {
    action: first!.action!,
    reasons: reasons.map(({ text }) => text),
    itemId: first!.itemId,
    positionId: first!.positionId,
    procedure: first!.procedure,
    band: reasons.length === 1 ? first!.band : null,
  }
}

function minutesOf({ action }: Fix): number {
  return action.minutes ?? Infinity
}
