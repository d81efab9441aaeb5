import { capital, onBand, PROCEDURE_WORDS } from '../readiness/words.ts'
import { skippedTest } from './skip-test.ts'
import type { WhatIfStep } from './steps.ts'
import { findItem, type World } from './world.ts'

/** What a step does, in plain words, as the world was before it: "Put XFM-13 into K-18". */
export function stepSentence(world: World, step: WhatIfStep): string {
  const kit = (id: string) => world.kits.get(id)?.kit.designation ?? 'a kit'
  const position = (kitId: string, positionId: string) =>
    world.kits.get(kitId)?.positions.find(({ id }) => id === positionId)?.name ?? 'part'
  switch (step.kind) {
    case 'move':
      return `Put ${nameOf(world, step.itemId)}${fromKit(world, step.itemId)} into ${kit(step.kitId)}`
    case 'take-out':
      return `Take ${nameOf(world, step.itemId)} out${fromKit(world, step.itemId)}`
    case 'find':
      return `Bring ${nameOf(world, step.itemId)} back`
    case 'pass':
      return `${capital(PROCEDURE_WORDS[step.procedure])} of ${nameOf(world, step.subjectId)}${onBand(step.band)} passes`
    case 'count':
      return `Count ${kit(step.kitId)}`
    case 'back':
      return `Say that ${kit(step.kitId)} is available again`
    case 'buy':
      return `Buy a new ${position(step.kitId, step.positionId)} for ${kit(step.kitId)}`
    case 'skip': {
      const state = world.kits.get(step.kitId)
      const what = state ? skippedTest(state, step) : PROCEDURE_WORDS[step.procedure]
      const inKit = step.subjectId === step.kitId ? '' : ` (${kit(step.kitId)})`
      return `Skip the ${what}${inKit}${step.accept ? ' and accept the risk' : ''}`
    }
  }
}

function nameOf(world: World, id: string): string {
  const instruments = [...world.kits.values(), ...world.loose.values()].flatMap((state) => state.instruments)
  return (
    findItem(world, id)?.item.designation ??
    world.kits.get(id)?.kit.designation ??
    instruments.find((one) => one.id === id)?.designation ??
    'a part'
  )
}

function fromKit(world: World, itemId: string): string {
  const found = findItem(world, itemId)
  return found && !found.loose ? ` of ${found.state.kit.designation}` : ''
}
