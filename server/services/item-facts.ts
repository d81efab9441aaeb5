import type { ItemFacts } from '#shared/engine/readiness/types.ts'

/** Fields of an item's details that readiness reads; they carry the same names there. */
const FACTS = [
  'bands',
  'ratedWatts',
  'ratedAh',
  'chemistry',
  'maxA',
  'drawA',
  'receiveA',
  'meanLoadA',
  'lossDb',
] as const

/** What of an item's own fields decides. `details` were checked when they were stored. */
export function itemFacts(details: Record<string, unknown>, acquiredOn: string | null): ItemFacts {
  const known = FACTS.filter((name) => details[name] !== undefined).map((name) => [name, details[name]])
  const ratings = [details.ratedA, details.fuseA].filter((amps) => typeof amps === 'number')
  return {
    ...(Object.fromEntries(known) as ItemFacts),
    // A lead carries what its weakest part does.
    ...(ratings.length > 0 && { ratedA: Math.min(...ratings) }),
    ...(isPower(details) && { supplyW: details.supplyV * details.supplyA }),
    ...(acquiredOn !== null && { acquiredOn }),
  }
}

const isPower = (details: Record<string, unknown>): details is { supplyV: number; supplyA: number } =>
  typeof details.supplyV === 'number' && typeof details.supplyA === 'number'
