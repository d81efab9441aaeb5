/**
 * Which steps of a what-if can be done here and now, by moving things on record and by people's word, and which wait
 * for the world: a test counts when it is recorded, a part when it is there. What leans on a waiting step waits too,
 * so that no kit is taken apart for a part that is still to be bought.
 */
import { isFailure, type Outcome } from '../outcome.ts'
import type { EpochMs } from '../readiness/types.ts'
import { applyStep } from './apply-steps.ts'
import { stepSentence } from './step-sentences.ts'
import type { WhatIfStep } from './steps.ts'
import { findItem, type World } from './world.ts'
import { stepFailure } from './step-failure.ts'

export interface ToldStep {
  readonly step: WhatIfStep
  /** "Put XFM-13 into K-18". */
  readonly text: string
  /** Why it cannot be done here and now; null where it can. */
  readonly waits: string | null
  /** Kits that it changes. */
  readonly kitIds: readonly string[]
}

/** Positions that something waiting is to fill: nothing leaves them before. */
type Promised = ReadonlySet<string>

export function tellSteps(world: World, steps: readonly WhatIfStep[], at: EpochMs): Outcome<ToldStep[]> {
  for (let promised: Promised = new Set(); ;) {
    const told = tellOnce(world, steps, { at, promised })
    if (isFailure(told)) return told
    const next = promisedBy(told)
    if (next.size === promised.size) return told
    promised = next
  }
}

export const doable = (told: readonly ToldStep[]): WhatIfStep[] =>
  told.filter(({ waits }) => waits === null).map(({ step }) => step)

function promisedBy(told: readonly ToldStep[]): Promised {
  return new Set(
    told.flatMap(({ step, waits }) =>
      waits !== null && (step.kind === 'buy' || step.kind === 'move')
        ? [slot(step.kitId, step.positionId)]
        : [],
    ),
  )
}

const slot = (kitId: string, positionId: string | null) => `${kitId} ${positionId}`

interface Walk {
  /** Everything so far done. */
  readonly all: World
  /** Only what can be done. */
  readonly real: World
  /** Kits that a waiting step is about. */
  readonly unfinished: ReadonlySet<string>
  readonly told: readonly ToldStep[]
}

function tellOnce(
  world: World,
  steps: readonly WhatIfStep[],
  { at, promised }: { at: EpochMs; promised: Promised },
): Outcome<ToldStep[]> {
  let walk: Walk = { all: world, real: world, unfinished: new Set(), told: [] }
  for (const [place, step] of steps.entries()) {
    const all = applyStep(walk.all, step, at)
    if (isFailure(all)) return stepFailure(all, place)
    const real = applyStep(walk.real, step, at)
    const waits = waitsFor(walk, step, promised) ?? (isFailure(real) ? EARLIER : null)
    const text = stepSentence(walk.all, step)
    const kitIds = changedKits(walk.all, all)
    walk = {
      all,
      real: waits === null && !isFailure(real) ? real : walk.real,
      unfinished: waits === null ? walk.unfinished : new Set([...walk.unfinished, ...kitIds]),
      told: [...walk.told, { step, text, waits, kitIds }],
    }
  }
  return [...walk.told]
}

export function changedKits(before: World, after: World): string[] {
  return [...after.kits].filter(([id, state]) => before.kits.get(id) !== state).map(([id]) => id)
}

const EARLIER = 'Waits for a change above that cannot be made here.'
const NEW_PART = 'Waits until the new part is there.'

function waitsFor({ all, real, unfinished }: Walk, step: WhatIfStep, promised: Promised): string | null {
  switch (step.kind) {
    case 'buy':
      return 'Nothing is bought from here: it stays a note until the part is there and on record.'
    case 'pass':
    case 'count':
      return 'Only a test on record proves anything: record it once it is done.'
    case 'find':
      return 'Say so on the page of the item once it is there.'
    case 'back':
      return unfinished.has(step.kitId) ? EARLIER : null
    case 'skip':
      return null
    case 'move':
    case 'take-out':
      return leaving(all, real, step.itemId, promised)
  }
}

function leaving(all: World, real: World, itemId: string, promised: Promised): string | null {
  const there = findItem(real, itemId)
  if (!there) return NEW_PART
  if (promised.has(slot(there.state.kit.id, there.item.positionId))) return NEW_PART
  const then = findItem(all, itemId)
  const same =
    there.state.kit.id === then?.state.kit.id &&
    there.item.positionId === then.item.positionId &&
    there.item.condition === then.item.condition
  return same ? null : EARLIER
}
