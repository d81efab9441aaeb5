import { SMALLEST_SHOWN_M } from '#shared/engine/exposure.ts'

interface Distance {
  readonly distanceM: number
  /** False: so near that the method does not reach there. */
  readonly covered: boolean
}

interface Units {
  readonly shown: (stored: number, unit: string) => number
  readonly text: (stored: number, unit: string, digits?: number) => string
  readonly stored: (shown: number, unit: string) => number
}

/** A distance that somebody must keep, rounded up: `1.1 m` of 1.04 m. Calculation sheet, section 11: none under 0.2 m. */
export function keepAwayText({ distanceM, covered }: Distance, units: Units): string {
  if (!covered) return `${roundedUp(SMALLEST_SHOWN_M, units)} or less`
  return roundedUp(distanceM, units)
}

function roundedUp(metres: number, { shown, stored, text }: Units): string {
  // Binary fractions: 0.3 times ten is a little over 3, which is no tenth more.
  const tenths = Math.ceil(shown(metres, 'm') * 10 - 1e-9)
  return text(stored(tenths / 10, 'm'), 'm', 1)
}
