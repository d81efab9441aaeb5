import type { Shortfall } from './need.ts'

/** A figure below this part of what is needed is another class of station, not a near miss. Our choice. */
const NEAR_FRACTION = 0.5

/** The further down, the more has to happen before the kit could do it. Our choice. */
const DISTANCE: Readonly<Record<Shortfall['kind'], number>> = {
  watts: 0,
  hours: 0,
  place: 1,
  availability: 2,
  mode: 3,
  band: 4,
  verdict: 5,
  'not-built': Infinity,
}

/**
 * How far the kit is from what it lacks: 0 is close, null is too far to be called near. Near is what lacks one kind of
 * thing. A kit whose verdict does not let it go lacks its bands for the same cause.
 */
export function nearnessOf(shortfalls: readonly Shortfall[]): number | null {
  const causes = causesOf(shortfalls)
  const [first] = causes
  if (!first || causes.some(({ kind }) => kind !== first.kind)) return null
  const distance = Math.max(...causes.map(distanceOf))
  return Number.isFinite(distance) ? distance : null
}

/** The shortfalls that are nobody else's consequence. */
export function causesOf(shortfalls: readonly Shortfall[]): readonly Shortfall[] {
  const cannotGo = shortfalls.some(({ kind }) => kind === 'verdict')
  return cannotGo ? shortfalls.filter(({ kind }) => kind !== 'band') : shortfalls
}

function distanceOf(shortfall: Shortfall): number {
  const distance = DISTANCE[shortfall.kind]
  if (shortfall.kind === 'verdict') return shortfall.verdict === 'not-fit' ? distance + 1 : distance
  if (shortfall.kind !== 'watts' && shortfall.kind !== 'hours') return distance
  // Nobody knows: a measurement away, which may show enough.
  const fraction = shortfall.has === null ? NEAR_FRACTION : shortfall.has / shortfall.needed
  return fraction < NEAR_FRACTION ? Infinity : distance + 1 - fraction
}
