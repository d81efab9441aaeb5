import type { ConflictField } from '@/components/ConflictDialog.vue'

/** Both versions of a record field by field, each written as people read it under the same labels. */
export function conflictsOf(
  mine: Readonly<Record<string, string>>,
  theirs: Readonly<Record<string, string>>,
): ConflictField[] {
  const labels = [...new Set([...Object.keys(mine), ...Object.keys(theirs)])]
  return labels.map((label) => ({ label, mine: mine[label] ?? '', theirs: theirs[label] ?? '' }))
}
