/** The address of a call: `:name` parts filled in, the query in the contract's own order, absent values left out. */
export function addressOf(path: string, params: unknown, query: unknown): string {
  const filled = path.replace(/:(\w+)/g, (_part, name: string) => encodeURIComponent(textOf(params, name)))
  const search = new URLSearchParams(
    Object.entries((query ?? {}) as Record<string, unknown>)
      .filter(([, value]) => value !== undefined && value !== null && value !== '')
      .map(([name, value]) => [name, String(value)]),
  ).toString()
  return search === '' ? filled : `${filled}?${search}`
}

function textOf(params: unknown, name: string): string {
  const value = (params as Record<string, unknown> | undefined)?.[name]
  if (value === undefined) throw new RangeError(`The address needs ${name}.`)
  return String(value)
}
