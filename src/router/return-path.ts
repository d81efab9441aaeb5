import type { RouteLocationNormalized } from 'vue-router'

/** Where to go after signing in. Only paths of our own: never another site's address. */
export function returnPath(route: Pick<RouteLocationNormalized, 'query'>): string {
  const then = route.query.then
  return typeof then === 'string' && /^\/(?![/\\])/.test(then) ? then : '/'
}
