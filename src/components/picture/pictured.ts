import type { Procedure } from '#shared/engine/vocabulary.ts'

/** The procedures whose tests have a picture; the others say all in words. */
export const PICTURED: ReadonlySet<Procedure> = new Set<Procedure>([
  'heat-test',
  'pair-loss',
  'open-short-load',
  'antenna-sweep',
  'feedline-loss',
  'battery-capacity',
  'radio-check',
])
