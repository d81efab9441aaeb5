import type { PlainDate } from '../plain-date.ts'
import type { EpochMs, KitState } from '../readiness/types.ts'
import { isDeployable } from '../vocabulary.ts'
import { choosePlans, tokensOf } from './choose-plans.ts'
import { behind, ownPlans, plansTo, recall } from './kit-plans.ts'
import { situationOf, type Situation } from './situation.ts'
import type { AdviceKit, Plan } from './work.ts'

interface Day {
  readonly at: EpochMs
  readonly today: PlainDate
  /** Awaited between kits, so that a server can answer others meanwhile. */
  readonly breathe?: () => Promise<void>
}

type Breathe = Day['breathe']

/**
 * What to do across the group, most readiness per attended hour first: kits that become deployable, then kits that
 * become proven or come back. Plans that compete for a spare or a kit are chosen together (`choosePlans`). A kit that
 * takes long to be proven and little to be deployable has a line for each.
 */
export async function rankFixes(
  kits: readonly AdviceKit[],
  spares: readonly KitState[],
  { at, today, breathe }: Day,
): Promise<Plan[]> {
  const situation = situationOf(kits, spares, { at, today })
  const plans = await everyPlan(situation, breathe)
  const chosen = atHandFirst(plans)
  const all = [...chosen, ...(await fromWhatIsLeft(situation, chosen, breathe))]
  return [...all, ...all.flatMap((plan) => firstStepOf(plan, plans))].sort(mostFirst)
}

async function everyPlan(
  { sources, verdictOf, late, here, barriers }: Situation,
  breathe: Breathe,
): Promise<Plan[]> {
  const plans = late.flatMap((kit) => recall(sources, kit))
  for (const kit of here) {
    await breathe?.()
    plans.push(...ownPlans(sources, kit, isDeployable(verdictOf(kit))))
  }
  // A kit that comes back with what is at hand is not taken apart for another.
  const saved = new Set(plans.filter((plan) => !buys(plan) && plan.deployable > 0).map(({ kitId }) => kitId))
  const halves = here.filter((kit) => !isDeployable(verdictOf(kit)) && !saved.has(kit.state.kit.id))
  const donors = halves.map(({ state }) => state)
  for (const kit of halves) {
    await breathe?.()
    plans.push(...plansTo('deployable', { ...sources, donors }, kit))
  }
  for (const barrier of barriers) {
    await breathe?.()
    plans.push(...behind(sources, barrier))
  }
  return plans
}

/** With what is at hand first, for that can be done today; then what must be bought, for kits that are left. */
function atHandFirst(plans: readonly Plan[]): Plan[] {
  const atHand = choosePlans(plans.filter((plan) => !buys(plan)))
  const taken = new Set(atHand.flatMap(tokensOf))
  const left = plans.filter((plan) => buys(plan) && isFree(plan, taken))
  return [...atHand, ...choosePlans(left)]
}

/** Spares that went elsewhere leave some kits without a way: theirs are looked for among what is left. */
async function fromWhatIsLeft(
  { sources, verdictOf, here }: Situation,
  chosen: readonly Plan[],
  breathe: Breathe,
): Promise<Plan[]> {
  const taken = new Set(chosen.flatMap(tokensOf))
  const loose = new Map([...sources.world.loose].filter(([itemId]) => !taken.has(itemId)))
  const left = { ...sources, world: { ...sources.world, loose } }
  const plans: Plan[] = []
  for (const kit of here.filter(({ state }) => !taken.has(`kit:${state.kit.id}`))) {
    await breathe?.()
    plans.push(...ownPlans(left, kit, isDeployable(verdictOf(kit))).filter((plan) => isFree(plan, taken)))
  }
  return choosePlans(plans)
}

const isFree = (plan: Plan, taken: ReadonlySet<string>) => !tokensOf(plan).some((token) => taken.has(token))

const buys = ({ works }: Plan) => works.some(({ steps }) => steps.some(({ kind }) => kind === 'buy'))

/** The much shorter way that makes the same kit deployable with parts that the chosen one uses too. */
function firstStepOf(plan: Plan, plans: readonly Plan[]): Plan[] {
  if (plan.deployable === 0) return []
  const shorter = plans.find(
    (one) =>
      one.kitId === plan.kitId &&
      one.deployable === plan.deployable &&
      one.minutes * 2 <= plan.minutes &&
      one.uses.every((token) => plan.uses.includes(token)),
  )
  return shorter ? [shorter] : []
}

/** Per attended hour: deployable, then proven or back; at last the shorter. */
function mostFirst(a: Plan, b: Plan): number {
  return (
    perMinute(b, b.deployable) - perMinute(a, a.deployable) ||
    perMinute(b, b.proven + b.returned) - perMinute(a, a.proven + a.returned) ||
    a.minutes - b.minutes ||
    a.changes[0]!.designation.localeCompare(b.changes[0]!.designation)
  )
}

const perMinute = ({ minutes }: Plan, gained: number) => gained / Math.max(1, minutes)
