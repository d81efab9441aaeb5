import type { RouteLocationRaw, Router } from 'vue-router'
import type { AdvicePlan } from '#shared/contracts/advice.ts'
import { recordTestLink } from '@/router/record-test-link.ts'
import { VERDICT_WORDS } from '@/words.ts'

export type AdviceWork = AdvicePlan['works'][number]

/** What is done, as a heading: all of it where it is short, else its first part and how many follow. */
export function headline({ works }: AdvicePlan): string {
  const timed = works.filter(({ minutes }) => minutes > 0)
  // A station that only has to be said available again takes no time, and is told all the same.
  const busy = timed.length > 0 ? timed : works
  const [first, second] = busy.map(({ text }) => text)
  if (busy.length <= 1) return first ?? ''
  if (busy.length === 2) return `${first}, then ${lowered(second!)}`
  return `${first}, then ${busy.length - 1} more things`
}

/** Designations keep their capitals: only a word in lower case after its first letter is lowered. */
const lowered = (text: string) =>
  /^[A-Z][a-z]/.test(text) ? text.charAt(0).toLowerCase() + text.slice(1) : text

/** "K-18 goes from not fit to proven, K-12 comes back". */
export function yieldText({ changes }: Pick<AdvicePlan, 'changes'>): string {
  const told = changes.flatMap(({ designation, before, after, returns }) => {
    if (before !== after) return [`${designation} goes from ${word(before)} to ${word(after)}`]
    return returns ? [`${designation} comes back, ${word(after)}`] : []
  })
  return told.join(', ')
}

const word = (verdict: keyof typeof VERDICT_WORDS) => VERDICT_WORDS[verdict].toLowerCase()

export interface WorkLink {
  readonly to: RouteLocationRaw
  readonly label: string
}

const UUID = /^[0-9a-f-]{36}$/

/** Where a work is recorded once it is done: the form of its test, or the kit whose items move. */
export function workLink(router: Router, { steps }: AdviceWork): WorkLink | null {
  const step = steps.find(({ kind }) => kind !== 'take-out')
  if (!step || step.kind === 'take-out') return null
  if (step.kind === 'pass') {
    if (!UUID.test(step.subjectId)) return null
    const subject = { type: 'item', id: step.subjectId } as const
    const to = recordTestLink(router, { subject, procedure: step.procedure })
    return to === null ? null : { to, label: 'Record it' }
  }
  if (step.kind === 'count') {
    const subject = { type: 'kit', id: step.kitId } as const
    const to = recordTestLink(router, { subject, procedure: 'count' })
    return to === null ? null : { to, label: 'Record it' }
  }
  if (step.kind === 'find')
    return { to: { name: 'item', params: { itemId: step.itemId } }, label: 'Open the item' }
  return { to: { name: 'kit', params: { kitId: step.kitId } }, label: 'Open the kit' }
}
