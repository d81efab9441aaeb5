const LONGEST = 120
/** Controls, ends of lines, halves of surrogate pairs, and marks that turn the direction of what follows. */
const UNSHOWN =
  /[\u0000-\u001F\u007F-\u009F\u200B-\u200F\u2028-\u202E\u2066-\u2069\uFEFF]|[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/g

/** A file's name as it can be shown: one line, no folder, at most 120 characters with its ending kept. */
export function shownName(sent: string): string {
  const last = sent.split(/[/\\]/).at(-1) ?? ''
  const plain = last.replace(UNSHOWN, '').normalize('NFC').trim()
  if (plain === '' || plain === '.' || plain === '..') return 'file'
  if (plain.length <= LONGEST) return plain
  const ending = /\.[^.]{1,8}$/.exec(plain)?.[0] ?? ''
  const kept = plain.slice(0, LONGEST - ending.length - 1).replace(/[\uD800-\uDBFF]$/, '')
  return `${kept}…${ending}`
}
