import { CHECK_WORDS } from '@/words.ts'

const STATES = ['overdue', 'due-soon', 'failed', 'in-doubt', 'never'] as const

/** The states that a list of due checks can be narrowed to. */
export const CHECK_STATES = STATES.map((value) => ({ value, label: CHECK_WORDS[value] }))
