import type { FunctionalComponent, Slot, VNode } from 'vue'

interface CellProps {
  /** The slot that the list's view gives for this column, if any. */
  draw: Slot | undefined
  row: unknown
  text: string
}

/** What stands in one cell: a dash where there is nothing, else the view's own drawing, else the text. */
export const RegistryCell: FunctionalComponent<CellProps> = ({ draw, row, text }): VNode[] | string =>
  text === '' ? '–' : draw ? draw({ row }) : text

RegistryCell.props = ['draw', 'row', 'text']
