import { randomBytes } from 'node:crypto'
import { hashPassword } from '#server/services/sign-in/password-hash.ts'
import { PERSON_KEYS } from './people.ts'
import { DEMO_SIGN_INS } from './sign-ins.ts'

/** Hashes by person. Whoever is not among the sign-ins gets a password that nobody knows, not even we. */
export async function hashPasswords(): Promise<ReadonlyMap<string, string>> {
  const nobodys = await hashPassword(randomBytes(32).toString('base64url'))
  const hashes = new Map<string, string>(PERSON_KEYS.map((person) => [person, nobodys]))
  for (const { person, password } of DEMO_SIGN_INS) hashes.set(person, await hashPassword(password))
  return hashes
}
