import type { BodyOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import type { previewPolicy as contract } from '#shared/contracts/policy-preview.ts'
import { startOfDayUtc } from '#shared/engine/local-day.ts'
import { causeOfChange, holdsUntil } from '#shared/engine/readiness/horizon.ts'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { KitState, Policy } from '#shared/engine/readiness/types.ts'
import { VERDICTS } from '#shared/engine/vocabulary.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'
import { kitsInUse } from '../kits-in-use.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { checkDay } from './create-policy.ts'

type Body = BodyOf<typeof contract>
type Preview = ResponseOf<typeof contract>
type Change = Preview['changes'][number]

/** Kits whose states are in memory at once. */
const STEP = 200

/** The same computation as when the version is put into force, on the same states, and nothing is written. */
export async function previewPolicy(tx: GroupTx, body: Body): Promise<Preview> {
  await checkDay(tx, body)
  const draft = await policyOf(tx, body)
  const at = Math.max(draft.effectiveFrom, tx.now.getTime())
  const kitIds = await kitsInUse(tx)
  const changes: Change[] = []
  for (let from = 0; from < kitIds.length; from += STEP) {
    const kits = await loadKitStates(tx, kitIds.slice(from, from + STEP), policiesOrFirst)
    changes.push(...kits.flatMap(({ state }) => changeOf(state, { draft, now: tx.now.getTime(), at })))
  }
  return { at: new Date(at).toISOString(), kits: kitIds.length, changes: changes.sort(worstFirst) }
}

async function policyOf(tx: GroupTx, { effectiveOn, settings, rules }: Body): Promise<Policy> {
  const effectiveFrom = startOfDayUtc(effectiveOn, await tx.zone())
  if (typeof effectiveFrom !== 'number') throw invalidField('#/effectiveOn', effectiveFrom.message)
  return { id: 'preview', name: 'preview', effectiveFrom, settings, rules } as Policy
}

interface Asked {
  readonly draft: Policy
  readonly now: number
  readonly at: number
}

function changeOf(state: KitState, { draft, now, at }: Asked): Change[] {
  const from = (periods: readonly Period[]) => periods.filter(({ to }) => to === null || to > at)
  const before = from(kitTimeline(state, now))
  const after = from(kitTimeline({ ...state, policies: [...state.policies, draft] }, now))
  const [was, becomes] = [standingOf(before), standingOf(after)]
  if (was.verdict === becomes.verdict && was.holdsUntil === becomes.holdsUntil) return []
  const { id: kitId, designation } = state.kit
  return [{ kitId, designation, before: was, after: becomes, cause: causeOfChange(before[0]!, after[0]!) }]
}

function standingOf(periods: readonly Period[]): Change['before'] {
  const until = holdsUntil(periods)
  return { verdict: periods[0]!.verdict, holdsUntil: until === null ? null : new Date(until).toISOString() }
}

function worstFirst(a: Change, b: Change): number {
  const rank = ({ after }: Change) => VERDICTS.indexOf(after.verdict)
  return rank(b) - rank(a) || a.designation.localeCompare(b.designation)
}
