import type { Category, Procedure } from '../vocabulary.ts'

/**
 * What stands outdoors at a station, and what is looked at after weather: an antenna that moved shows in its sweep,
 * water in a feedline in its loss, the rest to the eye. Common practice, no source.
 */
export const EXPOSED: Readonly<Partial<Record<Category, Procedure>>> = {
  antenna: 'antenna-sweep',
  feedline: 'feedline-loss',
  mast: 'inspection',
  'solar-panel': 'inspection',
}
