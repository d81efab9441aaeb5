/** Every entity by name, no globs. */
export const entities = []
