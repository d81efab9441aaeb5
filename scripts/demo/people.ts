import type { Role } from '#shared/contracts/roles.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'

/** The people of the scenario, section 2. All invented: nobody holds a call sign that begins with Q. */
export interface Person {
  readonly name: string
  readonly roles: readonly Role[]
  readonly callSign: string | null
  readonly licenceClass: string | null
  readonly licenceExpiresOn: PlainDate | null
  readonly notes: string
}

type Licence = 'Extra' | 'General' | 'Technician'

interface Held {
  readonly roles?: readonly Role[]
  readonly notes?: string
}

const member = (
  name: string,
  [callSign, licenceClass, licenceExpiresOn]: readonly [string, Licence, PlainDate],
  { roles = ['volunteer'], notes = '' }: Held = {},
): Person => ({ name, roles, callSign, licenceClass, licenceExpiresOn, notes })

const agency = (name: string, notes: string): Person => ({
  name,
  roles: ['observer'],
  callSign: null,
  licenceClass: null,
  licenceExpiresOn: null,
  notes,
})

export const PEOPLE = {
  ines: member('Ines Calderwick', ['QX0ICA', 'Extra', '2031-04-18'], {
    roles: ['administrator', 'net-coordinator'],
    notes: 'Net coordinator.',
  }),
  tobin: member('Tobin Arkwell', ['QX0TAR', 'General', '2029-09-07'], {
    roles: ['administrator', 'quartermaster'],
    notes: 'Quartermaster.',
  }),
  maren: member('Maren Oldstrand', ['QX0MOL', 'General', '2032-01-22'], {
    roles: ['quartermaster'],
    notes: 'Deputy quartermaster.',
  }),
  josiah: member('Josiah Fennimark', ['QX0JFE', 'Extra', '2028-06-30'], {
    notes: 'Leads the tests and builds the transformers.',
  }),
  lupe: member('Lupe Santaroya', ['QX0LSA', 'General', '2033-03-11'], {
    notes: 'In the field, where there is no signal.',
  }),
  everett: member('Everett Quillhouse', ['QX0EQU', 'General', '2027-02-19'], {
    notes: 'Large print, please.',
  }),
  nadira: member('Nadira Belhassane', ['QX0NBE', 'Technician', '2034-05-27'], {
    notes: 'Takes night shifts.',
  }),
  hollis: member('Hollis Wrenfield', ['QX0HWR', 'General', '2030-08-14'], {
    notes: 'Host of the Grange locker; has its only key.',
  }),
  piet: member('Piet Vandergrove', ['QX0PVA', 'Technician', '2029-11-03']),
  oona: member('Oona Kessleray', ['QX0OKE', 'Extra', '2030-02-25'], {
    roles: ['net-coordinator'],
    notes: 'Assistant coordinator.',
  }),
  marcus: member('Marcus Ladderby', ['QX0MLA', 'General', '2026-07-19'], {
    notes: 'Answers every call-out.',
  }),
  yuna: member('Yuna Tanemorri', ['QX0YTA', 'Technician', '2035-01-09'], { notes: 'Newest member.' }),
  beatriz: member('Beatriz Almofarra', ['QX0BAL', 'General', '2031-10-21'], { notes: 'Prints the labels.' }),
  gideon: member('Gideon Staplewick', ['QX0GST', 'Extra', '2027-12-15'], { notes: 'Relay on the ridge.' }),
  sunita: member('Sunita Ramakolla', ['QX0SRA', 'General', '2033-07-08'], { notes: 'Digital kits.' }),
  walt: member('Walt Burrowdale', ['QX0WBU', 'General', '2027-01-12']),
  femi: member('Femi Adekolin', ['QX0FAD', 'Technician', '2032-06-17']),
  greta: member('Greta Lindqvale', ['QX0GLI', 'General', '2029-04-04'], { notes: 'Batteries.' }),
  rafael: member('Rafael Ybarronda', ['QX0RYB', 'Technician', '2034-09-23']),
  thandi: member('Thandi Molokane', ['QX0TMO', 'General', '2030-12-10']),
  carl: member('Carl Ostermede', ['QX0COS', 'General', '2028-03-28'], { notes: 'Storm spotter.' }),
  june: member('June Pettifold', ['QX0JPE', 'Technician', '2031-08-16'], { notes: 'Treasurer; asset list.' }),
  dana: agency('Dana Whitlow-Ames', 'County duty officer.'),
  arturo: agency('Arturo Belmonde', 'Hospital.'),
  shirin: agency('Shirin Parvanak', 'Shelters.'),
} as const satisfies Record<string, Person>

export type PersonKey = keyof typeof PEOPLE

export const PERSON_KEYS = Object.keys(PEOPLE) as PersonKey[]

/** Ends in the only domain that the demo may name. */
export function emailOf(name: string): string {
  return `${name.toLowerCase().replaceAll(' ', '.')}@example.org`
}

/** A number of the range that is kept for fiction, 0100 to 0199. */
export function phoneOf(person: PersonKey): string {
  return `(555) 555-01${String(PERSON_KEYS.indexOf(person) + 1).padStart(2, '0')}`
}
