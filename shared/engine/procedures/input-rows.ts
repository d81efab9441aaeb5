import type { Procedure } from '../vocabulary.ts'

/** Where the rows of a procedure's inputs stand, for a failure that names one by its number. */
export const INPUT_ROWS: Readonly<Partial<Record<Procedure, string>>> = {
  'heat-test': 'readings',
  'pair-loss': 'bands',
}
