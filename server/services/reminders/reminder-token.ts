import { createHmac, timingSafeEqual } from 'node:crypto'
import { z } from 'zod'

/** Whose reminders a link is about. The link may be used any number of times and opens nothing else. */
export interface ReminderLinkOwner {
  readonly groupId: string
  readonly memberId: string
}

const uuid = z.uuid()

/** `<group>.<member>.<mac>`: signed, so that nothing needs to be stored, and bound to this one use of the secret. */
export function makeReminderToken(secret: string, { groupId, memberId }: ReminderLinkOwner): string {
  return `${groupId}.${memberId}.${mac(secret, groupId, memberId).toString('base64url')}`
}

export function readReminderToken(secret: string, token: string): ReminderLinkOwner | undefined {
  const [groupId, memberId, signature, ...rest] = token.split('.')
  if (!uuid.safeParse(groupId).success || !uuid.safeParse(memberId).success || rest.length > 0)
    return undefined
  const given = Buffer.from(signature ?? '', 'base64url')
  const expected = mac(secret, groupId!, memberId!)
  if (given.length !== expected.length || !timingSafeEqual(given, expected)) return undefined
  return { groupId: groupId!, memberId: memberId! }
}

function mac(secret: string, groupId: string, memberId: string): Buffer {
  return createHmac('sha256', secret).update(`reminder-link:${groupId}:${memberId}`).digest()
}
