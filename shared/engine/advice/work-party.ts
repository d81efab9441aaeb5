import type { Category } from '../vocabulary.ts'
import { partyJobOf, type PartyJob, type PartyTask } from './party-jobs.ts'
import { canBeDone, scheduleJobs, type Slot } from './party-schedule.ts'
import type { Plan } from './work.ts'

export interface PartyInstrument {
  readonly id: string
  readonly designation: string
  readonly category: Category
}

export interface Party {
  readonly people: number
  readonly minutes: number
  /** At hand; battery testers run through the night. */
  readonly instruments: readonly PartyInstrument[]
}

export interface BenchTask extends PartyTask {
  /** Minutes after the beginning. */
  readonly from: number
  readonly to: number
  readonly instrument: string | null
  /** The first kit that it is done for. */
  readonly kit: string
}

/** A capacity run on one tester through one night; night 1 begins when the party ends. */
export interface NightRun {
  readonly text: string
  readonly itemId: string
  readonly tester: string
  readonly night: number
}

export interface LeftOver {
  readonly plan: Plan
  readonly why: 'time' | 'instrument'
}

export interface PartyPlan {
  readonly benches: readonly (readonly BenchTask[])[]
  readonly nights: readonly NightRun[]
  readonly done: readonly PartyJob[]
  readonly left: readonly LeftOver[]
}

/** Minutes that one person needs to put one battery on a tester. Common practice, no source. */
const START_MINUTES = 10

/** A work party from what to do across the group, most readiness an hour first: one list for each bench. */
export function planWorkParty(plans: readonly Plan[], party: Party): PartyPlan {
  const jobs = plans.map(partyJobOf)
  const testers = party.instruments.filter(({ category }) => category === 'battery-tester')
  const canRun = (job: PartyJob) => job.runs.length === 0 || testers.length > 0
  const possible = withStarts(
    jobs.filter((job) => canBeDone(job, party) && canRun(job)),
    testers.length,
  )
  const slots = scheduleJobs(
    possible.map((job) => ({ ...job, worth: atHandFirst(job) })),
    party,
  )
  const done = possible.filter(
    (job, place) => job.tasks.length === 0 || slots.some((slot) => slot.job === place),
  )
  const doneIds = new Set(done.map(({ plan }) => plan))
  const possibleIds = new Set(possible.map(({ plan }) => plan))
  return {
    benches: benchesOf(possible, slots, party),
    nights: nightsOf(done, testers),
    done,
    left: plans
      .filter((plan) => !doneIds.has(plan))
      .map((plan) => ({ plan, why: possibleIds.has(plan) ? 'time' : 'instrument' })),
  }
}

/** What waits for an errand may come to nothing: whatever can be done that evening for sure goes before it. */
const atHandFirst = ({ worth, before }: PartyJob) => (before.length === 0 ? worth : worth / ERRAND)
const ERRAND = 1000

/** The batteries of the first night are put on during the party: that takes somebody's time too. */
function withStarts(jobs: readonly PartyJob[], testers: number): PartyJob[] {
  let free = testers
  return jobs.map((job) => {
    const starting = job.runs.slice(0, free)
    free -= starting.length
    const starts = starting.map(({ text }) => ({
      text: `Put on a tester for the night: ${text}`,
      minutes: START_MINUTES,
      procedure: 'battery-capacity' as const,
      needs: [],
    }))
    return { ...job, tasks: [...job.tasks, ...starts] }
  })
}

function benchesOf(
  jobs: readonly PartyJob[],
  slots: readonly Slot[],
  { people, instruments }: Party,
): BenchTask[][] {
  const nameOf = new Map(instruments.map(({ id, designation }) => [id, designation]))
  return Array.from({ length: people }, (_, person) =>
    slots
      .filter((slot) => slot.person === person)
      .sort((a, b) => a.from - b.from)
      .map(({ job, task, from, to, instrumentId }) => ({
        ...jobs[job]!.tasks[task]!,
        from,
        to,
        instrument: instrumentId === null ? null : (nameOf.get(instrumentId) ?? null),
        kit: jobs[job]!.plan.changes[0]?.designation ?? '',
      })),
  )
}

/** Each tester takes one battery a night, those of the worthiest plans first; none sits idle while one waits. */
function nightsOf(done: readonly PartyJob[], testers: readonly PartyInstrument[]): NightRun[] {
  return done
    .flatMap(({ runs }) => runs)
    .map((run, place) => ({
      ...run,
      tester: testers[place % testers.length]!.designation,
      night: Math.floor(place / testers.length) + 1,
    }))
}
