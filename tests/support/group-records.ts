/** One record of each kind in a group, made by the very operations that create them. */
import { v7 as uuidv7 } from 'uuid'
import { nextTag } from '#shared/engine/tag.ts'
import { isCreation, tryOperation, type Ids, type Operation } from './operations.ts'
import type { TestApp, TestMember } from './test-app.ts'

/** Ids of nothing: the same ones whenever the same names are asked for. */
export function idsOfNothing(): Ids {
  const { tag } = nextTag('RD', 9000) as { tag: string }
  return remembered({ tag, token: 'A'.repeat(43), subjectType: 'kit' })
}

/**
 * Ids by the name that stands for them in paths and bodies.
 * @throws Error when the body made from a creation's schema is refused: `operation-bodies.ts` must say one then.
 */
export async function givenRecords(
  app: TestApp,
  { operations, by }: { operations: readonly Operation[]; by: TestMember },
): Promise<Ids> {
  const known: Record<string, string> = { subjectType: 'kit' }
  const ids = remembered(known)
  for (const operation of operations.filter(isCreation)) {
    const { status, problem } = await tryOperation(app, operation, { cookie: by.cookie, ids })
    if (status >= 300) throw new Error(`${operation.name} answers ${status}: ${JSON.stringify(problem)}`)
  }
  known.subjectId = ids('kitId')
  known.tag = await tagOf(by, ids('itemId'))
  known.sessionId = await sessionOf(by)
  return ids
}

function remembered(known: Record<string, string>): Ids {
  return (name) => (known[SAME_AS[name] ?? name] ??= uuidv7())
}

/** Names in bodies that stand for a record of another name. */
const SAME_AS: Record<string, string> = { instrumentId: 'itemId', holderId: 'memberId', ownerId: 'memberId' }

async function tagOf(by: TestMember, itemId: string): Promise<string> {
  const { body } = await by.get(`/api/v1/items/${itemId}`).expect(200)
  return (body as { tag: string }).tag
}

async function sessionOf(by: TestMember): Promise<string> {
  const { body } = await by.get('/api/v1/sessions').expect(200)
  return (body as { rows: { id: string }[] }).rows[0]!.id
}
