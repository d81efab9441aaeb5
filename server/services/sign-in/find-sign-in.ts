import type { AppContext } from '../../context.ts'
import { poolOf } from '../../pool.ts'

/** A member who may sign in with an address; one address can belong to members of several groups. */
export interface SignInRow {
  readonly member_id: string
  readonly group_id: string
  /** Null until an invitation is accepted. */
  readonly password_hash: string | null
}

const FIND = { name: 'find-sign-in', text: 'SELECT * FROM find_sign_in($1)' }

export async function findSignIn(ctx: AppContext, email: string): Promise<SignInRow[]> {
  const { rows } = await poolOf(ctx.db).query<SignInRow>({ ...FIND, values: [email] })
  return rows
}
