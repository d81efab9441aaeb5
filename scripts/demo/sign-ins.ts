import { ROLES, type Role } from '#shared/contracts/roles.ts'
import { emailOf, PEOPLE, type PersonKey } from './people.ts'

export interface DemoSignIn {
  readonly person: PersonKey
  readonly name: string
  readonly address: string
  readonly password: string
  /** The roles in words, for people. */
  readonly role: string
  readonly roles: readonly Role[]
}

const signIn = (person: PersonKey, password: string): DemoSignIn => {
  const { name, roles } = PEOPLE[person]
  const words = ROLES.filter((role) => (roles as readonly Role[]).includes(role))
  const role = `${name}: ${words.join(' and ').replaceAll('-', ' ')}`
  return { person, name, address: emailOf(name), password, role, roles: words }
}

/** Who can sign in to the demo group. The passphrases are known to everybody: the demo holds nothing but fiction. */
export const DEMO_SIGN_INS: readonly DemoSignIn[] = [
  signIn('ines', 'tidal lantern walnut gravel'),
  signIn('tobin', 'copper anvil meadow ribbon'),
  signIn('oona', 'velvet trellis pebble acorn'),
  signIn('maren', 'cedar saddle marble thistle'),
  signIn('lupe', 'canyon whistle clover paddle'),
  signIn('dana', 'harvest beacon willow kettle'),
]
