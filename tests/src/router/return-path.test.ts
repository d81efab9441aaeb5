import { describe, expect, it } from 'vitest'
import { returnPath } from '@/router/return-path.ts'

describe('the way back after signing in', () => {
  it.each(['/', '/kits/1?asOf=x', '/t/RD25MX'])('leads to %s', (then) => {
    expect(returnPath({ query: { then } })).toBe(then)
  })

  it.each(['//evil.example', '/\\evil.example', 'https://evil.example', 'javascript:alert(1)', ''])(
    'never leaves this site for %s',
    (then) => {
      expect(returnPath({ query: { then } })).toBe('/')
    },
  )

  it('leads to the board without a wish', () => {
    expect(returnPath({ query: {} })).toBe('/')
    expect(returnPath({ query: { then: ['/a', '/b'] } })).toBe('/')
  })
})
