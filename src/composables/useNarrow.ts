import { readonly, ref } from 'vue'

/** The width below which pages are laid out for one hand; the style sheets use the same. */
const query = window.matchMedia('(max-width: 47.99rem)')
const narrow = ref(query.matches)
query.addEventListener('change', () => void (narrow.value = query.matches))

/** Whether the window is as narrow as a phone's. */
export function useNarrow() {
  return readonly(narrow)
}
