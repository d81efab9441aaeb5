import { MINUTES, SWAP_MINUTES, FETCH_MINUTES } from '../readiness/actions.ts'
import { checksOfItem } from '../readiness/checks.ts'
import { dossierOf, momentOf } from '../readiness/moment.ts'
import type { EpochMs, KitState, ReadinessItem } from '../readiness/types.ts'
import type { Band } from '../vocabulary.ts'
import { applySteps } from './apply-steps.ts'
import { judgeNow } from './judge-now.ts'
import { isFailure } from '../outcome.ts'
import type { WhatIfStep } from './steps.ts'
import type { Work } from './work.ts'
import { alone, type World } from './world.ts'

/** Where parts may come from. */
export interface Sources {
  readonly world: World
  /** Kits that cannot go and can be reached: their sound parts may make another one whole. */
  readonly donors: readonly KitState[]
  /** Kits held back by a part too weak for them; it may do elsewhere once a stronger one is bought. */
  readonly handsOn: readonly { readonly state: KitState; readonly item: ReadinessItem }[]
  readonly at: EpochMs
  /** What was found out about single parts, kept for one run: the same part is looked at for many kits. */
  readonly known: Map<string, number>
}

export interface Gap {
  readonly state: KitState
  readonly positionId: string
  /** What is in the way and comes out. */
  readonly old: ReadinessItem | undefined
}

/** Parts tried for one position: the best by their record. Common practice, no source. */
const MOST_SPARES = 3
const MOST_DONORS = 1

/** Every way to fill a position: a spare, the part of a kit that cannot go, one handed on, one bought. */
export function fillings(sources: Sources, gap: Gap): Work[] {
  const position = gap.state.positions.find(({ id }) => id === gap.positionId)
  if (!position) return []
  const fits = (item: ReadinessItem) =>
    item.category === position.category &&
    item.condition === 'serviceable' &&
    item.id !== gap.old?.id &&
    serves(item.facts.bands, gap.state.promise.bands) &&
    serves(item.facts.lossDb && (Object.keys(item.facts.lossDb) as Band[]), gap.state.promise.bands)
  const loose = [...sources.world.loose.values()]
    .filter((spare) => isSound(sources, spare))
    .flatMap(({ items }) => items)
    .filter(fits)
  const lent = sources.donors
    .filter(({ kit }) => kit.id !== gap.state.kit.id)
    .flatMap((state) => state.items.filter(fits).map((item) => ({ state, item })))
    .filter(({ state, item }) => isSound(sources, alone({ state, item })))
  const handed = sources.handsOn.filter(({ state, item }) => state.kit.id !== gap.state.kit.id && fits(item))
  return [
    ...bestFirst(
      sources,
      gap,
      loose.map((item) => swap(gap, item)),
    ).slice(0, MOST_SPARES),
    ...bestFirst(
      sources,
      gap,
      lent.map(({ state, item }) => swap(gap, item, state)),
    ).slice(0, MOST_DONORS),
    ...handed.map(({ state, item }) => handOn(gap, item, state)),
    bought(gap, position.name),
  ]
}

/** Covers a band of the promise, or does not say which bands it covers. */
const serves = (bands: readonly Band[] | undefined, promised: readonly Band[]) =>
  bands === undefined ||
  bands.length === 0 ||
  promised.length === 0 ||
  promised.some((band) => bands.includes(band))

/** What failed a test on any of its bands is no spare, not even for a kit that does without that band. */
function isSound({ at, known }: Sources, spare: KitState): boolean {
  const failed = kept(known, spare.kit.id, () => {
    const moment = momentOf(dossierOf(spare), at)
    const checks = spare.items.flatMap((item) => checksOfItem(moment, item, { vital: false, bands: [] }))
    return checks.filter(({ finding }) => finding === 'fail').length
  })
  return failed === 0
}

function kept(known: Map<string, number>, key: string, find: () => number): number {
  const value = known.get(key) ?? find()
  known.set(key, value)
  return value
}

function outOf({ old }: Gap): WhatIfStep[] {
  return old ? [{ kind: 'take-out', itemId: old.id }] : []
}

function swap(gap: Gap, item: ReadinessItem, from?: KitState): Work {
  const { id: kitId, designation } = gap.state.kit
  const verb = gap.old ? 'Swap' : 'Put'
  return {
    text: `${verb} ${item.designation}${from ? ` of ${from.kit.designation}` : ''} into ${designation}${
      gap.old ? ` for ${gap.old.designation}` : ''
    }`,
    minutes: SWAP_MINUTES,
    steps: [...outOf(gap), { kind: 'move', itemId: item.id, kitId, positionId: gap.positionId }],
    uses: from ? [item.id, `kit:${from.kit.id}`] : [item.id],
  }
}

function handOn(gap: Gap, item: ReadinessItem, from: KitState): Work {
  const { id: kitId, designation } = gap.state.kit
  return {
    text: `Buy a stronger part for ${from.kit.designation} and put its ${item.designation} into ${designation}`,
    minutes: FETCH_MINUTES + SWAP_MINUTES,
    steps: [
      { kind: 'buy', kitId: from.kit.id, positionId: item.positionId! },
      ...outOf(gap),
      { kind: 'move', itemId: item.id, kitId, positionId: gap.positionId },
    ],
    uses: [item.id, `kit:${from.kit.id}`],
  }
}

function bought(gap: Gap, position: string): Work {
  const { id: kitId, designation } = gap.state.kit
  return {
    text: gap.old
      ? `Buy a new ${position} for ${designation} in place of ${gap.old.designation}`
      : `Buy a new ${position} for ${designation}`,
    minutes: FETCH_MINUTES,
    // Bought before the old one goes: the new one is to be like it.
    steps: [{ kind: 'buy', kitId, positionId: gap.positionId }, ...outOf(gap)],
    uses: [],
  }
}

/** By what would still be to do about the part once it is in; equal ones in the order of their designations. */
function bestFirst(sources: Sources, gap: Gap, works: readonly Work[]): Work[] {
  const rest = (work: Work) => kept(sources.known, work.text, () => restOf(sources, gap, work))
  return works.filter((work) => rest(work) < Infinity).sort((a, b) => rest(a) - rest(b))
}

/** No test helps against it. */
const NO_TEST = 1000

function restOf({ world, at }: Sources, { state, positionId }: Gap, work: Work): number {
  const after = applySteps(world, work.steps, at)
  if (isFailure(after)) return Infinity
  return judgeNow(after.kits.get(state.kit.id)!, at)
    .reasons.filter((reason) => reason.positionId === positionId && reason.level !== 'note')
    .map(({ action, procedure }) => (action?.kind === 'test' && procedure ? MINUTES[procedure] : NO_TEST))
    .reduce((sum, minutes) => sum + minutes, 0)
}
