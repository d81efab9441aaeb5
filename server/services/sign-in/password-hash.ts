import { availableParallelism } from 'node:os'
import argon2 from 'argon2'
import { WorkGate } from '../work-gate.ts'

/** argon2id at the least that OWASP's password storage sheet asks for, 19 MiB; one lane leaves the other core alone. */
const SETTINGS = { type: argon2.argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const

/** Verified where there is no hash to verify, so that an unknown address takes as long as a known one. Matches nothing. */
const NOBODY = `$argon2id$v=19$m=${SETTINGS.memoryCost},t=${SETTINGS.timeCost},p=${SETTINGS.parallelism}$${'A'.repeat(22)}$${'A'.repeat(43)}`

const gate = new WorkGate({
  atOnce: Math.max(1, availableParallelism() - 1),
  longestQueue: 32,
  longestWaitMs: 3000,
  busy: 'Many are signing in just now. Try again in a moment.',
})

/** @throws AppError `unavailable` when too many hashes wait. */
export function hashPassword(password: string): Promise<string> {
  return gate.run(() => argon2.hash(password, SETTINGS))
}

/**
 * Whether a password belongs to a hash. Without a hash the answer is no, after the same time.
 * @throws AppError `unavailable` when too many hashes wait.
 */
export async function verifyPassword(hash: string | null, password: string): Promise<boolean> {
  const matches = await gate.run(() => argon2.verify(hash ?? NOBODY, password))
  return hash !== null && matches
}

/** The settings have risen since this hash was made. */
export function isOutdated(hash: string): boolean {
  return argon2.needsRehash(hash, SETTINGS)
}
