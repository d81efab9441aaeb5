import type { NeedAnswer } from '#shared/contracts/board-need.ts'
import type { SectionLayout } from './board-layout.ts'

export const NEED_HEADINGS = { can: 'Can do it', near: 'Nearly can', rest: 'Cannot' } as const

/**
 * The board's rows by what is needed: those that can in the board's own order, the near ones nearest first, then the
 * rest. Rows that a filter of the board leaves out stay out.
 */
export function needLayout(board: readonly SectionLayout[], answer: NeedAnswer): SectionLayout[] {
  const shown = board.flatMap(({ kitIds }) => kitIds)
  const present = new Set(shown)
  const can = new Set(answer.can)
  const near = answer.near.map(({ kitId }) => kitId).filter((kitId) => present.has(kitId))
  const isNear = new Set(near)
  return [
    { section: 'can', kitIds: shown.filter((kitId) => can.has(kitId)) },
    { section: 'near', kitIds: near },
    { section: 'rest', kitIds: shown.filter((kitId) => !can.has(kitId) && !isNear.has(kitId)) },
  ]
}
