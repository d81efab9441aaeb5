import 'vue-router'
import type { Role } from '#shared/contracts/roles.ts'

declare module 'vue-router' {
  interface RouteMeta {
    /** The page's name in the window's title. */
    title: string
    /** Who may open it; absent: every member. `public` pages need no session. */
    roles?: readonly Role[]
    public?: boolean
    /** The page does without the component library and the query cache, so that it opens fast. */
    light?: boolean
  }
}
