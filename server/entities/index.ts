import { Credential } from './Credential.ts'
import { Group } from './Group.ts'
import { Member } from './Member.ts'
import { OneTimeLink } from './OneTimeLink.ts'

/** Every entity by name, no globs. */
export const entities = [Credential, Group, Member, OneTimeLink]
