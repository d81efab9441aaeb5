import type { PlainDate } from '#shared/engine/plain-date.ts'

/** One day's round of a procedure: numbers of the kits whose part was tested, and of spares. */
export interface LineRound {
  readonly on: PlainDate
  /** Nobody begins earlier; when the party begins unless given. */
  readonly from?: string
  readonly kits: readonly string[]
  readonly spares?: readonly string[]
}

export const linesOf = ({ kits, spares = [] }: LineRound): string[] => [...kits, ...spares]
