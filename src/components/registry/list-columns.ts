import type { RouteLocationRaw } from 'vue-router'

/** One column of a registry list. `key` names the slot `cell-<key>`, which may draw it otherwise than as text. */
export interface ListColumn<Row> {
  readonly key: string
  readonly label: string
  readonly text: (row: Row) => string
  /** On a card, where no column head stands above: "3 kits" for "3". */
  readonly cardText?: (row: Row) => string
  /** The contract's word, where the list can be sorted by it. */
  readonly sort?: string
  /** False: hidden until the member asks for it. */
  readonly shown?: boolean
  readonly numeric?: boolean
  /** Never breaks: dates, verdicts. */
  readonly whole?: boolean
  /** Holds whole sentences. */
  readonly wide?: boolean
  /** Stands on the phone's card too. */
  readonly card?: boolean
}

/** One filter: a name of the contract's query and its words. The empty value is "no matter". */
export interface ListFilter {
  readonly name: string
  readonly label: string
  /** Hidden at the desk until it is asked for or set. */
  readonly rare?: boolean
  readonly options: readonly { readonly value: string; readonly label: string }[]
}

/** A registry list as its view declares it. The first column names the row and leads to its page. */
export interface ListPlan<Row> {
  readonly columns: readonly ListColumn<Row>[]
  readonly filters: readonly ListFilter[]
  /** What a search looks through, for the hint in its field: "designation, tag, maker". */
  readonly searched: string
  readonly noun: readonly [one: string, many: string]
  readonly to: (row: Row) => RouteLocationRaw
}

export const RETIRED_FILTER: ListFilter = {
  name: 'retired',
  label: 'Retired',
  options: [
    { value: 'yes', label: 'Only retired' },
    { value: 'any', label: 'With retired' },
  ],
}

/** The closed words of a vocabulary as options. */
export function optionsOf<Word extends string>(words: Readonly<Record<Word, string>>) {
  return (Object.entries(words) as [Word, string][]).map(([value, label]) => ({ value, label }))
}

/** Named things of the group as options. */
export function namedOptions(list: readonly { readonly id: string; readonly name: string }[] | undefined) {
  return (list ?? []).map(({ id, name }) => ({ value: id, label: name }))
}
