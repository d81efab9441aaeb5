/**
 * Which plans to carry out when they compete for the same spares and kits: at most one a kit, no item twice, with the
 * most kits deployable, then proven or back, then the fewest minutes. An assignment of single spares would be a matter
 * for a library; a plan may need several at once, which makes it set packing: solved exactly by branch and bound,
 * parts that share nothing by themselves.
 */
export interface Choice {
  readonly kitId: string
  readonly uses: readonly string[]
  readonly minutes: number
  readonly deployable: number
  readonly proven: number
  readonly returned: number
}

/** Beyond this many looks the best found so far stands: groups with very many alike spares. */
const MOST_LOOKS = 50_000
const DEPLOYABLE = 1e12
const PROVEN = 1e8
/** A quick way to a kit that could not go is worth more than one to a kit that could go already. Our choice. */
const MINUTE_OF_DEPLOYABLE = 4

export function worthOf({ deployable, proven, returned, minutes }: Choice): number {
  const effort = deployable > 0 ? minutes * MINUTE_OF_DEPLOYABLE : minutes
  return deployable * DEPLOYABLE + (proven + returned) * PROVEN - effort
}

export function choosePlans<One extends Choice>(plans: readonly One[]): One[] {
  return apart(plans.filter((plan) => worthOf(plan) > 0)).flatMap(bestOf)
}

/** Groups of plans that share neither kit nor item with another group. */
function apart<One extends Choice>(plans: readonly One[]): One[][] {
  const groups: { tokens: Set<string>; plans: One[] }[] = []
  for (const plan of plans) {
    const tokens = new Set(tokensOf(plan))
    const joined = groups.filter((group) => [...tokens].some((token) => group.tokens.has(token)))
    const whole = { tokens, plans: [...joined.flatMap((group) => group.plans), plan] }
    for (const group of joined) {
      group.tokens.forEach((token) => tokens.add(token))
      groups.splice(groups.indexOf(group), 1)
    }
    groups.push(whole)
  }
  return groups.map((group) => group.plans)
}

/** The kit and whatever else a plan needs for itself. */
export const tokensOf = ({ kitId, uses }: Choice) => [`kit:${kitId}`, ...uses]

function bestOf<One extends Choice>(plans: readonly One[]): One[] {
  const kits = [...new Set(plans.map(({ kitId }) => kitId))]
  const options = kits
    .map((kitId) => plans.filter((plan) => plan.kitId === kitId).sort((a, b) => worthOf(b) - worthOf(a)))
    .sort((a, b) => worthOf(b[0]!) - worthOf(a[0]!))
  // What the kits from here on could yield if nothing competed.
  const hopes = options.map((_, from) => options.slice(from).reduce((sum, [best]) => sum + worthOf(best!), 0))
  let best: { worth: number; chosen: readonly One[] } = { worth: 0, chosen: [] }
  let looks = 0
  const look = (from: number, worth: number, chosen: readonly One[], taken: ReadonlySet<string>): void => {
    looks += 1
    if (worth > best.worth) best = { worth, chosen }
    if (looks > MOST_LOOKS || from === options.length || worth + hopes[from]! <= best.worth) return
    for (const plan of options[from]!) {
      const tokens = tokensOf(plan)
      if (tokens.some((token) => taken.has(token))) continue
      look(from + 1, worth + worthOf(plan), [...chosen, plan], new Set([...taken, ...tokens]))
    }
    look(from + 1, worth, chosen, taken)
  }
  look(0, 0, [], new Set())
  return [...best.chosen]
}
