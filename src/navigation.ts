import { ADMINISTRATORS, ANY_MEMBER, CREW, KEEPERS, type Role } from '#shared/contracts/roles.ts'

/** One way into the product. Shown where its route exists and the member holds one of the roles. */
export interface NavigationEntry {
  /** Name of the route. */
  readonly name: string
  readonly label: string
  readonly roles: readonly Role[]
  /** What it is for, on the page that lists everything. */
  readonly about: string
  /** Stands in the bar at the bottom of the phone, with this sign. */
  readonly sign?: 'board' | 'kit' | 'item' | 'find' | 'more'
}

/** In the order of the header. A new section adds its line here and its route in `router/routes.ts`. */
export const NAVIGATION: readonly NavigationEntry[] = [
  {
    name: 'board',
    label: 'Board',
    roles: ANY_MEMBER,
    about: 'Which kits can go, and until when',
    sign: 'board',
  },
  {
    name: 'kits',
    label: 'Kits',
    roles: CREW,
    about: 'Every packed station and what belongs in it',
    sign: 'kit',
  },
  { name: 'items', label: 'Items', roles: CREW, about: 'Every tagged thing and where it is', sign: 'item' },
  { name: 'find', label: 'Find', roles: CREW, about: 'A thing by its tag', sign: 'find' },
  { name: 'forecast', label: 'Forecast', roles: CREW, about: 'What lapses in the coming year, and when' },
  { name: 'advice', label: 'What to do', roles: CREW, about: 'Most readiness for an hour of work' },
  { name: 'tests', label: 'Tests', roles: CREW, about: 'What was measured, and what is due' },
  {
    name: 'consumables',
    label: 'Consumables',
    roles: CREW,
    about: 'Fuses, tape, dry cells: counted, not tagged',
  },
  { name: 'places', label: 'Places', roles: CREW, about: 'Where kits and items live, and who has the key' },
  { name: 'kit-kinds', label: 'Kinds', roles: CREW, about: 'What each kind of kit promises and must carry' },
  { name: 'build-sheets', label: 'Builds', roles: CREW, about: 'How transformers and antennas were made' },
  { name: 'tags', label: 'Tags', roles: KEEPERS, about: 'Printed tags with their codes' },
  { name: 'policy', label: 'Policy', roles: CREW, about: 'Which tests are due when, and their limits' },
  { name: 'people', label: 'People', roles: ADMINISTRATORS, about: 'Members, roles and invitations' },
]

export function isAllowed(allowed: readonly Role[] | undefined, held: readonly Role[]): boolean {
  return allowed === undefined || allowed.some((role) => held.includes(role))
}
