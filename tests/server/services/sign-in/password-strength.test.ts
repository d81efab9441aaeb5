/** Which passwords are taken (promise P17). */
import { describe, expect, it } from 'vitest'
import { PASSWORD_MAX, PASSWORD_MIN } from '#shared/contracts/people-fields.ts'
import { COMMON_PARTS } from '#server/services/sign-in/common-passwords.ts'
import { weaknessOf } from '#server/services/sign-in/password-strength.ts'

const NAMES = ['Halyard', 'Ridge Emergency Radio Group', 'RERG', 'Ida Quillfeather', 'QX0IQF', 'ida.q']

describe('weaknessOf', () => {
  it('knows more than 10,000 common passwords of fitting length', () => {
    const pairs = COMMON_PARTS.flatMap((one) => COMMON_PARTS.map((other) => one + other))
    const fitting = new Set(pairs.filter(({ length }) => length >= PASSWORD_MIN && length <= PASSWORD_MAX))
    expect(fitting.size).toBeGreaterThan(10_000)
    const sample = [...fitting].filter((_, index) => index % 1000 === 0)
    expect(sample.filter((password) => weaknessOf(password, []) === undefined)).toEqual([])
  })

  it.each([
    'passwordpassword',
    'Password12345678',
    'P@ssw0rd!P@ssw0rd!',
    'iloveyouiloveyou',
    'letmeinletmeinletmein',
    'thisismypassword',
    'qwertyuiopasdfghjkl',
    '1qaz2wsx3edc4rfv',
    'q1w2e3r4t5y6u7i8',
    'qazwsxedcrfvtgb',
    '123456789012345',
    '12345678987654321',
    'aaaaaaaaaaaaaaaa',
    'abababababababab',
    'abcdefghijklmnopqrstuvwxyz',
    'correct horse battery staple',
    'trustno1trustno1',
    'Summer2026Summer2026',
    'football football',
    'xk7xk7xk7xk7xk7xk7',
  ])('calls %s common', (password) => {
    expect(weaknessOf(password, NAMES)).toBe('common')
  })

  it.each([
    'halyardhalyard1',
    'Halyard-Password-1',
    'ridgeemergencyradiogroup',
    'Ridge Group 2026 !!',
    'quillfeather ida 1',
    'QX0IQF QX0IQF QX0IQF 9',
    'Qu1llfe4ther!Qu1llfe4ther',
  ])('calls %s made of names', (password) => {
    expect(weaknessOf(password, NAMES)).toBe('known-name')
  })

  it.each([
    'plum cartwheel seldom quarry',
    'vexed tundra omelette 9',
    'my halyard holds up the blue tarpaulin',
    'gj4-Xp0w-77zk-Lmq2',
    'кот доедает холодный борщ',
    '山の中で静かに紅茶を飲んで待つ朝',
  ])('takes %s', (password) => {
    expect(weaknessOf(password, NAMES)).toBeUndefined()
  })

  it('takes 128 characters in well under a tenth of a second', () => {
    const startedAt = performance.now()
    weaknessOf('plum cartwheel seldom quarry '.repeat(5).slice(0, 127), NAMES)
    expect(performance.now() - startedAt).toBeLessThan(100)
  })
})
