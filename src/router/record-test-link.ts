import type { RouteLocationRaw, Router } from 'vue-router'
import type { Procedure } from '#shared/engine/vocabulary.ts'

interface Wanted {
  readonly subject: { readonly type: 'item' | 'kit'; readonly id: string }
  readonly procedure: Procedure
  /** The test that the new one corrects. */
  readonly corrects?: string
}

/**
 * The page that records a test of an item (`record-test`) or a kit (`record-kit-test`), with the procedure and, for a
 * correction, the test that it replaces; null where there is no such page.
 */
export function recordTestLink(
  router: Router,
  { subject, procedure, corrects }: Wanted,
): RouteLocationRaw | null {
  const name = subject.type === 'item' ? 'record-test' : 'record-kit-test'
  if (!router.hasRoute(name)) return null
  const params = subject.type === 'item' ? { itemId: subject.id } : { kitId: subject.id }
  return { name, params: { ...params, procedure }, query: corrects ? { corrects } : {} }
}
