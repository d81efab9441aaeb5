import { CABLES } from './feedline-cable.ts'

const plain = (name: string) => name.toLowerCase().replace(/[^a-z0-9]/g, '')

/** The key of the table's cable that a free name means: "RG 58/U" is `rg-58`; undefined when it is none of them. */
export function cableKeyOf(name: string): string | undefined {
  const asked = plain(name)
  const exact = CABLES.find(({ key, name: known }) => [plain(key), plain(known)].includes(asked))
  if (exact) return exact.key
  // Suffixes of a maker ("RG-213/U", "RG-58 C/U") do not change the kind; a digit or an X after the name does.
  return CABLES.find(({ key }) => new RegExp(`^${plain(key)}[acu]{1,2}$`).test(asked))?.key
}
