import type { Deed } from '../deeds.ts'
import { addConsumable, changeStock, noteLot } from './consumables.ts'
import { askForCheck, recall, takeBackCheck, test } from './evidence.ts'
import { addItem, pack, retireItem, setCondition, shelve } from './items.ts'
import { changeKit, setAvailability } from './kits.ts'
import { enrol, noteAbout } from './people.ts'
import { putPolicyInForce } from './policy.ts'
import { addBatch, addBuildSheet, addKind, addKit, addPlace, changePlace } from './registry.ts'
import type { Stage } from './stage.ts'

type Plays = { readonly [D in Deed as D['do']]: (stage: Stage, deed: D) => Promise<void> }

/** Each deed goes through the service that a request would have gone through. */
const PLAYS: Plays = {
  'put-policy-in-force': putPolicyInForce,
  enrol,
  'note-about': noteAbout,
  'add-place': addPlace,
  'change-place': changePlace,
  'add-kind': addKind,
  'add-build-sheet': addBuildSheet,
  'add-batch': addBatch,
  'add-kit': addKit,
  'add-item': addItem,
  'add-consumable': addConsumable,
  'change-stock': changeStock,
  'note-lot': noteLot,
  pack,
  shelve,
  'set-condition': setCondition,
  'retire-item': retireItem,
  'change-kit': changeKit,
  'set-availability': setAvailability,
  test,
  'ask-for-check': askForCheck,
  'take-back-check': takeBackCheck,
  recall,
}

export function play(stage: Stage, deed: Deed): Promise<void> {
  const own = PLAYS[deed.do] as (stage: Stage, deed: Deed) => Promise<void>
  return own(stage, deed)
}
