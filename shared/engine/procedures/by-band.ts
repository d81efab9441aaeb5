import { groupBy } from '../group-by.ts'
import { BANDS, type Band } from '../vocabulary.ts'

type Rows<Row> = readonly [Row, ...Row[]]

/** Rows by band in wavelength order; a band has at least one row. */
export function byBand<Row extends { readonly band: Band }>(rows: readonly Row[]): [Band, Rows<Row>][] {
  const groups = groupBy(rows, (row) => row.band)
  return BANDS.flatMap((band) => {
    const [first, ...rest] = groups.get(band) ?? []
    return first ? [[band, [first, ...rest]] as [Band, Rows<Row>]] : []
  })
}
