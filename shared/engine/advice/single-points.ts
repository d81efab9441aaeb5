import { counted, listText } from '../plain-words.ts'
import { PROCEDURE_WORDS } from '../readiness/words.ts'
import type { Category, Procedure } from '../vocabulary.ts'

/** What a group has only one of, so that one absence stops something. */
export interface SinglePoint {
  readonly kind: 'key' | 'instrument' | 'charger' | 'tester' | 'role' | 'operator'
  /** "Hollis Wrenfield alone has the key of Quarry Bend Grange Locker: 4 kits wait behind it." */
  readonly text: string
  readonly todo: string
}

export interface GroupFacts {
  readonly places: readonly { readonly name: string; readonly keyHolders: string; readonly kits: number }[]
  /** Serviceable instruments, by category. */
  readonly instruments: readonly { readonly category: Category; readonly designations: readonly string[] }[]
  /** Kits that have a battery and no charger of their own, and the loose chargers. */
  readonly chargers: { readonly kitsWithout: number; readonly loose: readonly string[] }
  /** Who made tests of a procedure in the last two years. */
  readonly testers: readonly { readonly procedure: Procedure; readonly names: readonly string[] }[]
  readonly roles: readonly { readonly role: string; readonly names: readonly string[] }[]
  /** Members whose licence is in force. */
  readonly operators: readonly string[]
}

export function singlePoints(facts: GroupFacts): SinglePoint[] {
  return [
    ...facts.places.flatMap(keyPoint),
    ...facts.roles.flatMap(rolePoint),
    ...operatorPoint(facts.operators),
    ...facts.testers.flatMap(testerPoint),
    ...facts.instruments.flatMap(instrumentPoint),
    ...chargerPoint(facts.chargers),
  ]
}

/** Key holders are free text: names, and whatever else opens the door, each after a comma, a semicolon or "and". */
export function holdersIn(keyHolders: string): string[] {
  return keyHolders
    .split(/[,;\n]|\band\b|&/)
    .map((name) => name.trim())
    .filter((name) => name !== '')
}

function keyPoint({ name, keyHolders, kits }: GroupFacts['places'][number]): SinglePoint[] {
  const holders = holdersIn(keyHolders)
  if (kits === 0 || holders.length > 1) return []
  const behind = `${counted(kits, 'kit')} ${kits === 1 ? 'lies' : 'lie'} behind it`
  const text =
    holders.length === 0
      ? `Nobody is on record as having the key of ${name}: ${behind}`
      : `${holders[0]} alone has the key of ${name}: ${behind}`
  return [
    { kind: 'key', text, todo: 'Give a second person a key, or hang a lockbox, and enter it with the place' },
  ]
}

function rolePoint({ role, names }: GroupFacts['roles'][number]): SinglePoint[] {
  if (names.length !== 1) return []
  const text = `${names[0]} alone is ${role}`
  return [{ kind: 'role', text, todo: `Ask a second member to take the role, and hand over together` }]
}

function operatorPoint(operators: readonly string[]): SinglePoint[] {
  if (operators.length > 1) return []
  const text =
    operators.length === 0
      ? 'No member has a licence in force on record: nobody is on record who may transmit'
      : `${operators[0]} alone has a licence in force on record`
  return [{ kind: 'operator', text, todo: 'Have members enter class and expiry of their licences' }]
}

function testerPoint({ procedure, names }: GroupFacts['testers'][number]): SinglePoint[] {
  if (names.length !== 1) return []
  const text = `${names[0]} alone has made a ${PROCEDURE_WORDS[procedure]} in the last two years`
  return [{ kind: 'tester', text, todo: 'Make the next one together with somebody who has not' }]
}

function instrumentPoint({ category, designations }: GroupFacts['instruments'][number]): SinglePoint[] {
  if (designations.length !== 1) return []
  const text = `${designations[0]} is the only serviceable ${category.replaceAll('-', ' ')}`
  return [{ kind: 'instrument', text, todo: 'Borrow or buy a second one, and compare the two on one part' }]
}

function chargerPoint({ kitsWithout, loose }: GroupFacts['chargers']): SinglePoint[] {
  if (kitsWithout === 0 || loose.length > 1) return []
  const all =
    loose.length === 0 ? 'there is no loose charger' : `${listText(loose)} is the only loose charger`
  const text = `${counted(kitsWithout, 'kit')} with batteries ${kitsWithout === 1 ? 'has' : 'have'} no charger of ${
    kitsWithout === 1 ? 'its' : 'their'
  } own, and ${all}`
  return [{ kind: 'charger', text, todo: 'Put a charger that suits the batteries on a shelf' }]
}
