import type { Accountability, Chemistry, Mode } from '#shared/engine/vocabulary.ts'

/** Words of the registry's pages, beside those that every page uses in `words.ts`. */

export const ACCOUNTABILITY_WORDS: Readonly<Record<Accountability, string>> = {
  accountable: 'Accountable: must come back, by its number',
  durable: 'Durable: must come back',
  expendable: 'Expendable: is used up',
}

export const CHEMISTRY_WORDS: Readonly<Record<Chemistry, string>> = {
  lifepo4: 'Lithium iron phosphate',
  'lithium-ion': 'Other lithium',
  agm: 'Lead-acid, AGM',
  gel: 'Lead-acid, gel',
  flooded: 'Lead-acid, flooded',
  nimh: 'Nickel metal hydride',
}

export const MODE_WORDS: Readonly<Record<Mode, string>> = {
  voice: 'Voice',
  digital: 'Digital',
  relay: 'Relay',
}
