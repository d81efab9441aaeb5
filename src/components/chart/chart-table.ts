/** The numbers of a picture as a table: what it is drawn from, with units in the headings. */
export interface ChartTable {
  readonly columns: readonly string[]
  readonly rows: readonly ChartRow[]
}

export interface ChartRow {
  readonly cells: readonly string[]
  /** The test that the row stands on, reached by its first cell. */
  readonly testId?: string
}
