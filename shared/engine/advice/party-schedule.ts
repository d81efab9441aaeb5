/**
 * Who does what when at a work party: jobs of tasks in their order, people who can each do one thing at a time, and
 * instruments that are at one bench at a time. The jobs that are finished within the time are to be worth most.
 * A first plan takes the jobs in the order given, worthiest first; branch and bound then looks for a better one, exactly
 * where the case is small and as far as `MOST_LOOKS` reaches where it is not.
 */
import type { Category } from '../vocabulary.ts'

export interface Job {
  readonly worth: number
  readonly tasks: readonly { readonly minutes: number; readonly needs: readonly Category[] }[]
}

export interface Means {
  readonly people: number
  readonly minutes: number
  readonly instruments: readonly { readonly id: string; readonly category: Category }[]
}

/** One task in its place: which job and which of its tasks, by whom, from when to when, with what. */
export interface Slot {
  readonly job: number
  readonly task: number
  readonly person: number
  readonly from: number
  readonly to: number
  readonly instrumentId: string | null
}

interface Node {
  readonly slots: readonly Slot[]
  /** When each person, instrument and job is free again, and the next task of each job. */
  readonly people: readonly number[]
  readonly instruments: readonly number[]
  readonly jobs: readonly { readonly next: number; readonly ready: number }[]
}

/** About a tenth of a second of a core that serves everybody. */
const MOST_LOOKS = 10_000

/** The slots of the jobs that are finished; a job that is not leaves no slot behind. */
export function scheduleJobs(jobs: readonly Job[], means: Means): Slot[] {
  const possible = jobs.map((job) => canBeDone(job, means))
  const start: Node = {
    slots: [],
    people: Array.from({ length: means.people }, () => 0),
    instruments: means.instruments.map(() => 0),
    jobs: jobs.map(() => ({ next: 0, ready: 0 })),
  }
  const search = { jobs, means, possible, best: byWorth(jobs, means, possible, start), looks: 0 }
  look(search, start)
  return finished(jobs, search.best)
}

/** Whether everything that the job is measured with is at hand at all. */
export function canBeDone(job: Job, { instruments }: Pick<Means, 'instruments'>): boolean {
  return job.tasks.every(
    ({ needs }) => needs.length === 0 || instruments.some(({ category }) => needs.includes(category)),
  )
}

interface Search {
  readonly jobs: readonly Job[]
  readonly means: Means
  readonly possible: readonly boolean[]
  best: Node
  looks: number
}

function byWorth(jobs: readonly Job[], means: Means, possible: readonly boolean[], start: Node): Node {
  const order = jobs.map((_, place) => place).filter((place) => possible[place])
  return order.reduce((node, place) => whole(jobs, means, node, place) ?? node, start)
}

/** The node with all tasks of one job in it, or undefined where they do not fit. */
function whole(jobs: readonly Job[], means: Means, node: Node, place: number): Node | undefined {
  return jobs[place]!.tasks.reduce<Node | undefined>(
    (now, task) => now && earliest(ways(now, { job: place, task, means })),
    node,
  )
}

const earliest = (nodes: readonly Node[]) =>
  nodes.reduce<Node | undefined>(
    (best, node) => (best && best.slots.at(-1)!.to <= node.slots.at(-1)!.to ? best : node),
    undefined,
  )

function look(search: Search, node: Node): void {
  search.looks += 1
  if (isBetter(search.jobs, node, search.best)) search.best = node
  if (search.looks > MOST_LOOKS || hope(search, node) < worthIn(search.jobs, search.best)) return
  for (const [place, { next }] of node.jobs.entries()) {
    const task = search.jobs[place]!.tasks[next]
    if (!task || !search.possible[place]) continue
    for (const after of ways(node, { job: place, task, means: search.means })) look(search, after)
  }
}

const isDone = (jobs: readonly Job[], node: Node, place: number) =>
  node.jobs[place]!.next === jobs[place]!.tasks.length

function worthIn(jobs: readonly Job[], node: Node): number {
  return jobs.reduce((sum, { worth }, place) => sum + (isDone(jobs, node, place) ? worth : 0), 0)
}

/** Everything that could still be finished if nobody were in anybody's way. */
function hope({ jobs, means, possible }: Search, node: Node): number {
  return jobs.reduce((sum, { worth, tasks }, place) => {
    const { next, ready } = node.jobs[place]!
    const left = tasks.slice(next).reduce((minutes, task) => minutes + task.minutes, 0)
    return possible[place] && ready + left <= means.minutes ? sum + worth : sum
  }, 0)
}

function isBetter(jobs: readonly Job[], node: Node, best: Node): boolean {
  const [one, other] = [worthIn(jobs, node), worthIn(jobs, best)]
  return one > other || (one === other && lastOf(jobs, node) < lastOf(jobs, best))
}

const lastOf = (jobs: readonly Job[], node: Node) => Math.max(0, ...finished(jobs, node).map(({ to }) => to))

function finished(jobs: readonly Job[], node: Node): Slot[] {
  return node.slots.filter(({ job }) => isDone(jobs, node, job))
}

interface Next {
  readonly job: number
  readonly task: Job['tasks'][number]
  readonly means: Means
}

/** The task as early as can be, once for each category of instrument that would do; none where time runs out. */
function ways(node: Node, { job, task, means }: Next): Node[] {
  const categories = task.needs.length === 0 ? [null] : task.needs
  return categories.flatMap((category) => {
    const instrument = category === null ? -1 : soonest(node, category, means)
    if (category !== null && instrument < 0) return []
    const free = instrument < 0 ? 0 : node.instruments[instrument]!
    const from = Math.max(node.jobs[job]!.ready, free, Math.min(...node.people))
    const to = from + task.minutes
    if (to > means.minutes) return []
    return [
      placed(node, {
        job,
        task: node.jobs[job]!.next,
        person: latestFree(node, from),
        from,
        to,
        instrument,
        means,
      }),
    ]
  })
}

function soonest({ instruments }: Node, category: Category, means: Means): number {
  return means.instruments.reduce((best, one, place) => {
    if (one.category !== category) return best
    return best < 0 || instruments[place]! < instruments[best]! ? place : best
  }, -1)
}

/** Of those who are free by then, whoever waited least: the others are kept for what could begin earlier. */
function latestFree({ people }: Node, from: number): number {
  return people.reduce(
    (best, free, place) => (free <= from && (best < 0 || free > people[best]!) ? place : best),
    -1,
  )
}

interface Placing extends Omit<Slot, 'instrumentId'> {
  /** Its place among the instruments; -1: none. */
  readonly instrument: number
  readonly means: Means
}

function placed(node: Node, { instrument, means, ...slot }: Placing): Node {
  const instrumentId = means.instruments[instrument]?.id ?? null
  return {
    slots: [...node.slots, { ...slot, instrumentId }],
    people: node.people.with(slot.person, slot.to),
    instruments: instrument < 0 ? node.instruments : node.instruments.with(instrument, slot.to),
    jobs: node.jobs.with(slot.job, { next: slot.task + 1, ready: slot.to }),
  }
}
