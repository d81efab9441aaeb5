import { later, onDay, type Local } from '../calendar.ts'
import { SEAL_LOT, SEALS } from '../consumables.ts'
import type { Step } from '../deeds.ts'
import type { CountTest } from '../demo-test.ts'
import { COUNT_ROUNDS, type CountRound } from './count-rounds.ts'

/** Counts of the kits and the numbered seals that close them, in the order in which the seals were taken. */

/** Power kits and test benches stand open on their shelves. */
const NEVER_SEALED = new Set(['K-21', 'K-22', 'K-23', 'K-24'])
const FIRST_SEAL = 401

const MINUTES_A_COUNT = 14

/** Walks through the rounds with the roll of seals in hand. */
function allCounts(): Step[] {
  const onLid = new Map<string, string>()
  let taken = 0
  const seal = () => `0${FIRST_SEAL + taken++}`
  return COUNT_ROUNDS.flatMap((round) => {
    const before = taken
    const steps = round.kits.map((kit, turn): Step => {
      const isSealed = !NEVER_SEALED.has(kit) && !round.leftOpen?.includes(kit)
      const sealFound = round.open?.includes(kit) ? null : (onLid.get(kit) ?? null)
      const sealApplied = isSealed ? seal() : null
      if (sealApplied) onLid.set(kit, sealApplied)
      return countStep(round, kit, turn, { sealFound, sealApplied })
    })
    return [...steps, ...sealsTaken(steps, taken - before)]
  })
}

type Seals = Pick<CountTest['inputs'], 'sealFound' | 'sealApplied'>

function countStep(round: CountRound, kit: string, turn: number, seals: Seals): Step {
  const by = round.crew[turn % round.crew.length]!
  const nth = Math.floor(turn / round.crew.length)
  const performed = later(onDay(round.on, round.from), nth * (MINUTES_A_COUNT + 1))
  const at: Local = round.sentAt ? onDay(round.on, round.sentAt) : later(performed, MINUTES_A_COUNT)
  const found = round.short?.[kit] ?? { short: {}, extra: [] }
  const test: CountTest = {
    procedure: 'count',
    subject: kit,
    performed,
    method: 'Every position against the load plan, lid to bottom',
    inputs: { ...found, ...seals },
    ...(round.notes !== undefined && { notes: round.notes }),
  }
  return { at, by, deed: { do: 'test', test } }
}

/** The seals used come off the shelf when the last kit of the round is closed. */
function sealsTaken(steps: readonly Step[], count: number): Step[] {
  const last = steps.at(-1)
  if (count === 0 || !last) return []
  const closedAt = steps.map(({ at }) => at).reduce((a, b) => (a > b ? a : b))
  const reason = `sealed ${count === 1 ? 'a kit' : `${count} kits`}`
  const deed = {
    do: 'change-stock',
    consumable: SEALS,
    lot: SEAL_LOT,
    difference: `-${count}`,
    reason,
  } as const
  return [{ at: later(closedAt, 2), by: last.by, deed }]
}

export const COUNT_STEPS: readonly Step[] = allCounts()
