/** Fields of a person, as the session, the profile and the people page share them. */
import { z } from 'zod'
import { line, plainDate, UNPRINTABLE } from './fields.ts'
import { ROLES } from './roles.ts'

/** Longest password that is taken; it is taken whole. */
export const PASSWORD_MAX = 128

/** Shortest password while it is the only factor. */
export const PASSWORD_MIN = 15

/**
 * Any characters but those that no keyboard makes; spaces count, nothing is trimmed. Lengths are in code points of the
 * composed form, so that an accent typed in two ways is one character and one password.
 */
const anyPassword = z
  .string()
  .max(4 * PASSWORD_MAX, `At most ${PASSWORD_MAX} characters.`)
  .refine((value) => !UNPRINTABLE.test(value), 'Contains characters that cannot be typed.')
  .transform((value) => value.normalize('NFC'))

const lengthOf = (value: string) => [...value].length

/** A password given to be checked. */
export const givenPassword = anyPassword.refine((value) => {
  const length = lengthOf(value)
  return length >= 1 && length <= PASSWORD_MAX
}, `1 to ${PASSWORD_MAX} characters.`)

/** A new password. The service checks beyond this that it is not a common one or made of known names. */
export const newPassword = anyPassword
  .refine(
    (value) => lengthOf(value) >= PASSWORD_MIN,
    `At least ${PASSWORD_MIN} characters: a few words will do.`,
  )
  .refine((value) => lengthOf(value) <= PASSWORD_MAX, `At most ${PASSWORD_MAX} characters.`)

/** One address in ASCII, as mail servers everywhere take it. Upper and lower case are the same address. */
export const emailAddress = line(254).pipe(z.email('Not an e-mail address: name@example.org.'))

/** Written one way: capitals without spaces; an ending such as /P stays. */
export const callSign = line(24)
  .transform((value) => value.replace(/\s+/g, '').toUpperCase())
  .pipe(
    z
      .string()
      .max(20)
      .regex(
        /^(?=[A-Z0-9]*[A-Z])[A-Z0-9]{1,3}[0-9][A-Z0-9]{0,3}[A-Z](\/[A-Z0-9]{1,4})?$/,
        'Not a call sign: letters and digits such as QX0ABC or QX0ABC/P.',
      ),
  )

/** Digits with the marks people write between them. */
export const phone = line(40, 3).refine(
  (value) => /^[+\d(][\d ()./-]*(?:(?:x|ext\.?) ?\d+)?$/i.test(value),
  'Not a telephone number.',
)

export const licenceClass = line(40, 1)

export const rolesOfMember = z
  .array(z.enum(ROLES))
  .min(1, 'Choose at least one role.')
  .max(ROLES.length)
  .refine((roles) => new Set(roles).size === roles.length, 'A role is named twice.')
  .transform((roles) => ROLES.filter((role) => roles.includes(role)))

export { lengthUnit, temperatureUnit } from './unit-choice.ts'

/** What a member says about themselves. */
export const ownFields = {
  name: line(120, 1),
  phone: phone.nullable(),
  callSign: callSign.nullable(),
  licenceClass: licenceClass.nullable(),
  licenceExpiresOn: plainDate.nullable(),
}
