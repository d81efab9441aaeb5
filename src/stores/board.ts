import { defineStore } from 'pinia'
import { shallowRef } from 'vue'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import type { SectionLayout } from '@/format/board-layout.ts'

/** The last board that was on the screen: coming back from a kit shows it at once, where it was. */
export interface KeptBoard {
  readonly address: string
  readonly memberId: string
  readonly board: BoardAnswer
  readonly layout: readonly SectionLayout[]
}

export const useBoardStore = defineStore('board', () => {
  const kept = shallowRef<KeptBoard | null>(null)
  return { kept }
})
