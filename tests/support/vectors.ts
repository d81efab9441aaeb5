import { readFileSync } from 'node:fs'

/** A file of `tests/fixtures/vectors`, written by the script of the same name in `scripts/vectors`. */
export function readVectors<T>(name: string): T {
  return JSON.parse(readFileSync(new URL(`../fixtures/vectors/${name}.json`, import.meta.url), 'utf8')) as T
}
