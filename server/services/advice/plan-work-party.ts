import type { BodyOf } from '#shared/contracts/endpoint.ts'
import type { planWorkParty as contract, WorkPartyPlan } from '#shared/contracts/work-party.ts'
import { planWorkParty as planParty, type BenchTask } from '#shared/engine/advice/work-party.ts'
import type { Plan } from '#shared/engine/advice/work.ts'
import { METHOD_CARDS } from '#shared/engine/procedures/method-cards.ts'
import { policyAt } from '#shared/engine/readiness/rules-in-force.ts'
import { READ_FROM } from '#shared/engine/procedures/subjects.ts'
import type { Procedure } from '#shared/engine/vocabulary.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type GroupTx } from '../../group-transaction.ts'
import { fittingInstruments } from '../evidence/form-instruments.ts'
import { policiesOf } from '../policies.ts'
import type { By } from '../registry/thing.ts'
import { advicePlans } from './advice-plans.ts'

type Body = BodyOf<typeof contract>

/** The advice, laid out for the people, hours, instruments and places that there are. */
export async function planWorkParty(ctx: AppContext, by: By, body: Body): Promise<WorkPartyPlan> {
  const instruments = await inGroup(ctx, by, (tx) => instrumentsAt(tx, body.instrumentIds))
  const { plans, placeOf, at } = await advicePlans(ctx, by)
  const isThere = ({ changes }: Plan) =>
    body.placeIds.length === 0 ||
    changes.every(({ kitId }) => body.placeIds.includes(placeOf.get(kitId) ?? ''))
  const first = onePerKit(plans)
  const party = {
    people: body.people,
    minutes: body.minutes,
    instruments: instruments.filter(({ atHand }) => atHand),
  }
  const { benches, nights, done, left } = planParty(first.filter(isThere), party)
  return {
    at: at.toISOString(),
    benches: benches.map((tasks) => ({
      tasks: tasks.map(shownTask),
      cautions: cautionsOf(tasks.map(({ procedure }) => procedure)),
    })),
    nights: nights.map(({ night, tester, text }) => ({ night, tester, text })),
    nightCautions: nights.length > 0 ? cautionsOf(['battery-capacity']) : [],
    before: done.flatMap((job) => job.before),
    then: done.flatMap((job) => job.then),
    done: done.map(({ plan }) => yieldOf(plan)),
    left: [
      ...left.map(({ plan, why }) => ({ ...yieldOf(plan), why })),
      ...first.filter((plan) => !isThere(plan)).map((plan) => ({ ...yieldOf(plan), why: 'place' as const })),
    ],
    instruments,
  }
}

/** The advice names a short way and a long way for some kits; at a party the first, best for its time, is taken. */
function onePerKit(plans: readonly Plan[]): Plan[] {
  return plans.filter((plan, place) => plans.findIndex(({ kitId }) => kitId === plan.kitId) === place)
}

/** What measures, and until when it may: what is out of calibration only casts doubt. */
async function instrumentsAt(
  tx: GroupTx,
  wanted: readonly string[] | null,
): Promise<WorkPartyPlan['instruments']> {
  const [policies, today] = await Promise.all([policiesOf(tx), tx.today()])
  const policy = policyAt({ policies }, tx.now.getTime())
  // A group that has not tested anything yet has no rules, and nothing to do either.
  if (!policy) return []
  const all = await fittingInstruments(tx, READ_FROM, policy)
  return all
    .map(({ id, designation, category, calibratedUntilOn }) => ({
      id,
      designation,
      category,
      calibratedUntilOn,
      atHand: wanted?.includes(id) ?? (calibratedUntilOn === null || calibratedUntilOn >= today),
    }))
    .sort((a, b) => a.designation.localeCompare(b.designation))
}

function shownTask({ from, to, text, kit, procedure, instrument }: BenchTask) {
  return { from, to, text, kit, procedure, instrument }
}

function cautionsOf(procedures: readonly (Procedure | null)[]): string[] {
  const cards = procedures.flatMap((procedure) =>
    procedure === null ? [] : METHOD_CARDS[procedure].slice(0, 1),
  )
  return [...new Set(cards.flatMap(({ cautions }) => cautions))]
}

function yieldOf({ works, changes, minutes }: Plan): WorkPartyPlan['done'][number] {
  return { text: works[0]?.text ?? '', changes: [...changes], minutes }
}
