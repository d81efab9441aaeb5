/** What may be in the product and in what it is built with: licences that the Open Source Initiative approved. */
const APPROVED = new Set([
  '0BSD',
  'Apache-2.0',
  'BlueOak-1.0.0',
  'BSD-2-Clause',
  'BSD-3-Clause',
  'ISC',
  // libvips, which sharp loads as a library of its own and unchanged.
  'LGPL-3.0-or-later',
  'MIT',
  'MIT-0',
  'MPL-2.0',
  'OFL-1.1',
  'Python-2.0',
  'Unlicense',
])

/**
 * Packages whose licence cannot be read from their own package.json, with what was read instead and where. A new
 * version must be looked at again.
 */
const READ_BY_HAND: Readonly<Record<string, string>> = {
  'png-js@2.0.0': 'MIT', // Its LICENSE file is the MIT licence.
}

export interface LockedPackage {
  name: string
  version: string
  /** An SPDX expression; undefined when the package names none. */
  licence: string | undefined
}

/** One sentence for each package whose licence is not approved. */
export function licenceFaults(packages: readonly LockedPackage[]): string[] {
  return packages.flatMap(({ name, version, licence }) => {
    const expression = licence ?? READ_BY_HAND[`${name}@${version}`]
    if (expression === undefined) return [`${name}@${version} names no licence.`]
    return isApproved(expression) ? [] : [`${name}@${version} is under ${expression}, which is not approved.`]
  })
}

/** Reads an SPDX expression: of an OR one side must be approved, of an AND both; `+` means "or later". */
export function isApproved(expression: string): boolean {
  const tokens = expression.match(/[()]|[^\s()]+/g) ?? []
  const reader = new ExpressionReader(tokens)
  const approved = reader.readOr()
  return approved && reader.isWhole
}

class ExpressionReader {
  readonly #tokens: readonly string[]
  #at = 0
  #isBroken = false

  constructor(tokens: readonly string[]) {
    this.#tokens = tokens
  }

  /** Read to its end without a fault. */
  get isWhole(): boolean {
    return !this.#isBroken && this.#at === this.#tokens.length
  }

  readOr(): boolean {
    let approved = this.#readAnd()
    while (this.#take('OR')) approved = this.#readAnd() || approved
    return approved
  }

  #readAnd(): boolean {
    let approved = this.#readOne()
    while (this.#take('AND')) approved = this.#readOne() && approved
    return approved
  }

  #readOne(): boolean {
    if (this.#take('(')) {
      const approved = this.readOr()
      if (!this.#take(')')) this.#isBroken = true
      return approved
    }
    const name = this.#tokens[this.#at++] ?? ''
    return APPROVED.has(name.replace(/\+$/, ''))
  }

  #take(token: string): boolean {
    if (this.#tokens[this.#at] !== token) return false
    this.#at++
    return true
  }
}
