import express from 'express'
import { describe, expect, it } from 'vitest'
import type { Endpoint } from '#shared/contracts/endpoint.ts'
import { EndpointRouter } from '#server/routes/endpoint.ts'

const bind = (endpoint: object) =>
  new EndpointRouter(express()).add(endpoint as Endpoint, async () => undefined)

const base = { name: 'leak', method: 'get', path: '/api/v1/leak', summary: 'Without a rule' }

describe('an endpoint (P14)', () => {
  it.each([
    ['without a rule', base],
    ['with a rule that names no role', { ...base, access: { scope: 'group', roles: [] } }],
    ['with a rule without roles', { ...base, access: { scope: 'self' } }],
    ['with an empty rule', { ...base, access: {} }],
  ])('does not start %s', (_what, endpoint) => {
    expect(() => bind(endpoint)).toThrow('leak has no access rule')
  })

  it('starts with a rule', () => {
    expect(() => bind({ ...base, access: { scope: 'public' } })).not.toThrow()
  })
})
