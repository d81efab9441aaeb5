/** What a kit draws over time: shares of time at currents. Source: calculation sheet, section 10. */
import { checkNumber, failure, type Failure, type Outcome } from './outcome.ts'

export interface LoadShare {
  /** Share of time, 0 to 1; all shares sum to 1. */
  readonly share: number
  /** 0 to 10,000 A. */
  readonly currentA: number
}

const SUM_WITHIN = 0.001

/** `E_SHARES` for a share outside 0 to 1 or a sum off 1 by more than 0.001; `E_RANGE` when nothing is drawn. */
export function checkProfile(profile: readonly LoadShare[]): Failure | undefined {
  if (!Array.isArray(profile) || profile.length === 0)
    return failure('E_MISSING', 'profile is missing: enter at least one share.', { field: 'profile' })
  for (const [row, load] of profile.entries()) {
    const bad = checkShare(load) ?? checkNumber('currentA', load.currentA, 0, 10_000)
    if (bad) return { ...bad, line: row + 1 }
  }
  const sum = profile.reduce((total, { share }) => total + share, 0)
  // The same slack for sums that are 0.001 off but for binary fractions.
  if (Math.abs(sum - 1) > SUM_WITHIN + 1e-12)
    return failure('E_SHARES', `The shares sum to ${sum}: they must sum to 1.`, { field: 'share' })
  if (profile.some(({ share, currentA }) => share * currentA > 0)) return undefined
  return failure('E_RANGE', 'The profile draws no current: enter what the kit draws.', { field: 'currentA' })
}

/** Mean over time, A: right for lithium, too kind for lead-acid. */
export function meanCurrentA(profile: readonly LoadShare[]): Outcome<number> {
  const bad = checkProfile(profile)
  return bad ?? profile.reduce((total, { share, currentA }) => total + share * currentA, 0)
}

/**
 * The steady current that empties a lead-acid battery in the same time, `(sum d I^k)^(1/k)`, A.
 * Peukert exponent k 1 to 1.5. Derived in the calculation sheet.
 */
export function equivalentCurrentA(profile: readonly LoadShare[], k: number): Outcome<number> {
  const bad = checkProfile(profile) ?? checkNumber('k', k, 1, 1.5)
  if (bad) return bad
  return profile.reduce((total, { share, currentA }) => total + share * currentA ** k, 0) ** (1 / k)
}

function checkShare(load: LoadShare): Failure | undefined {
  const bad = checkNumber('share', load?.share)
  if (bad || (load.share >= 0 && load.share <= 1)) return bad
  return failure('E_SHARES', `share is ${load.share}: it must be from 0 to 1.`, { field: 'share' })
}
