import type { FindingWord } from '#shared/engine/vocabulary.ts'

/** The filling of a finding: solid where it passes, else one of `ChartTextures` under that id. */
export function textureOf(id: string, finding: FindingWord): string {
  return finding === 'pass' ? 'var(--fill)' : `url(#${id}-${finding})`
}
