import type { Category } from '#shared/engine/vocabulary.ts'

/** "DC lead", "solar panel": a category in a sentence. */
export function categoryWords(category: Category): string {
  return category === 'dc-lead' ? 'DC lead' : category.replaceAll('-', ' ')
}

/** "a DC lead", "an antenna". */
export function aCategory(category: Category): string {
  return `${/^[aei]/.test(category) ? 'an' : 'a'} ${categoryWords(category)}`
}
