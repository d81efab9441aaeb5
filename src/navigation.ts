import { ADMINISTRATORS, ANY_MEMBER, CREW, KEEPERS, type Role } from '#shared/contracts/roles.ts'

/** One way into the product. Shown where its route exists and the member holds one of the roles. */
export interface NavigationEntry {
  /** Name of the route. */
  readonly name: string
  readonly label: string
  readonly roles: readonly Role[]
  /** Stands in the bar at the bottom of the phone, with this sign. */
  readonly sign?: 'board' | 'kit' | 'item' | 'find' | 'more'
}

/** In the order of the header. A new section adds its line here and in `navigation-about.ts`, and its route in
 * `router/routes.ts`. */
export const NAVIGATION: readonly NavigationEntry[] = [
  {
    name: 'board',
    label: 'Board',
    roles: ANY_MEMBER,
    sign: 'board',
  },
  {
    name: 'kits',
    label: 'Kits',
    roles: CREW,
    sign: 'kit',
  },
  { name: 'items', label: 'Items', roles: CREW, sign: 'item' },
  { name: 'find', label: 'Find', roles: CREW, sign: 'find' },
  { name: 'forecast', label: 'Forecast', roles: CREW },
  { name: 'advice', label: 'What to do', roles: CREW },
  { name: 'tests', label: 'Tests', roles: CREW },
  {
    name: 'consumables',
    label: 'Consumables',
    roles: CREW,
  },
  { name: 'places', label: 'Places', roles: CREW },
  { name: 'kit-kinds', label: 'Kinds', roles: CREW },
  { name: 'build-sheets', label: 'Builds', roles: CREW },
  { name: 'tags', label: 'Tags', roles: KEEPERS },
  { name: 'policy', label: 'Policy', roles: CREW },
  { name: 'people', label: 'People', roles: ADMINISTRATORS },
]

export function isAllowed(allowed: readonly Role[] | undefined, held: readonly Role[]): boolean {
  return allowed === undefined || allowed.some((role) => held.includes(role))
}
