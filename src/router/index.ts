import type { App } from 'vue'
import { createRouter, createWebHistory, type RouteLocationNormalized, type Router } from 'vue-router'
import { useHeadingFocus } from '@/composables/useHeadingFocus.ts'
import { setPageTitle } from '@/composables/usePageTitle.ts'
import { isAllowed } from '@/navigation.ts'
import type { SessionStore } from '@/stores/session.ts'
import { returnPath } from './return-path.ts'
import { routes } from './routes.ts'

export function createAppRouter(app: App, session: SessionStore): Router {
  const router = createRouter({
    history: createWebHistory(),
    routes,
    scrollBehavior: (to, from, saved) => saved ?? (to.path === from.path ? false : { top: 0 }),
  })
  router.beforeEach(async (to) => {
    await session.ensureLoaded()
    return admit(to, session)
  })
  router.beforeResolve(async (to) => {
    if (!to.meta.light) await withFullPages(app)
  })
  router.afterEach((to, from, failure) => {
    if (failure) return
    setPageTitle(to.meta.title)
    if (from.matched.length > 0 && to.path !== from.path) useHeadingFocus().request()
  })
  reloadOnStaleChunk(router)
  return router
}

/** Signed out: to the sign-in page and back here afterwards. Signed in without the role: told so. */
function admit(to: RouteLocationNormalized, session: SessionStore) {
  if (to.meta.public) {
    const settled = session.member && to.name === 'sign-in'
    return settled ? returnPath(to) : true
  }
  if (!session.member) return { name: 'sign-in', query: to.fullPath === '/' ? {} : { then: to.fullPath } }
  return isAllowed(to.meta.roles, session.member.heldRoles) ? true : { name: 'not-allowed' }
}

let installed: Promise<void> | undefined

function withFullPages(app: App): Promise<void> {
  installed ??= import('@/full-pages.ts').then(({ installFullPages }) => installFullPages(app))
  return installed
}

/** After a release the chunks of the page that is open are gone: load the whole page at the address wanted. */
function reloadOnStaleChunk(router: Router): void {
  router.onError((error: unknown, to) => {
    const stale = error instanceof TypeError && /import|module script|preload/i.test(error.message)
    if (stale && navigator.onLine) window.location.assign(to.fullPath)
  })
}
