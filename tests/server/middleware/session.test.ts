import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startTestApp, type TestApp, type TestGroup } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Ridge Group')
})
afterAll(() => app.close())

describe('session', () => {
  it('lets a request with a session through', async () => {
    const member = await app.givenMember(group)
    const { body } = await member.get('/api/v1/openapi.json').expect(200)
    expect(body).toMatchObject({ openapi: '3.1.0' })
  })
})
