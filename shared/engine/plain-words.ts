/** `1 kit`, `2 kits`: the noun's plural is given where it is not the noun and an s. */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${count} ${count === 1 ? one : many}`
}

/** `40 m`, `40 m and 20 m`, `40 m, 20 m and 10 m`; nothing for none. */
export function listText(words: readonly string[]): string {
  if (words.length < 2) return words.join('')
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`
}
