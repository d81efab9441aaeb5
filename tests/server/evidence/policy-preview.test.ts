import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { PolicyAnswer } from '#shared/contracts/policy.ts'
import { previewPolicy } from '#shared/contracts/policy-preview.ts'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { D0, LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

let demo: DemoApp
let ines: TestMember
let current: PolicyAnswer

beforeAll(async () => {
  demo = await startDemoApp(D0)
  ines = await demo.as('ines')
  current = (await ines.get('/api/v1/policy').expect(200)).body as PolicyAnswer
}, LOADING_MS)
afterAll(() => demo.close())

const rules = (change: (rule: PolicyAnswer['rules'][number]) => object = () => ({})) =>
  current.rules.map((rule) => ({ ...rule, ...change(rule), id: uuidv7() }))
const shorterCounts = () => rules(({ procedure }) => (procedure === 'count' ? { intervalMonths: 1 } : {}))

async function preview(body: object): Promise<ResponseOf<typeof previewPolicy>> {
  const answer = await ines.post('/api/v1/policy/preview', body).expect(200)
  return previewPolicy.response.parse(answer.body)
}

describe('the preview of a policy', () => {
  it('finds no change where the rules are those in force', async () => {
    const settings = current.settings
    expect(await preview({ effectiveOn: '2026-12-01', settings, rules: rules() })).toMatchObject({
      kits: 24,
      changes: [],
    })
  })

  it('says of every kit what is so once the version is in force, and stores nothing', async () => {
    const body = { effectiveOn: '2026-12-01', settings: current.settings, rules: shorterCounts() }
    const { at, changes } = await preview(body)
    expect(changes.length).toBeGreaterThan(5)
    expect((await ines.get('/api/v1/policies').expect(200)).body.total).toBe(1)

    const id = uuidv7()
    await ines
      .put(`/api/v1/policies/${id}`, { ...body, name: 'Counted each month', reason: 'To see' })
      .expect(200)
    for (const { kitId, designation, after } of changes) {
      const path = `/api/v1/kits/${kitId}/readiness?asOf=${encodeURIComponent(at)}`
      const kit = (await ines.get(path).expect(200)).body as KitReadiness
      expect({ verdict: kit.period.verdict, holdsUntil: kit.holdsUntil }, designation).toEqual(after)
    }
  })

  it('refuses a day that has passed, and rules that are none', async () => {
    const settings = current.settings
    await ines
      .post('/api/v1/policy/preview', { effectiveOn: '2026-01-01', settings, rules: rules() })
      .expect(422)
    await ines.post('/api/v1/policy/preview', { effectiveOn: '2026-12-01', settings, rules: [] }).expect(422)
  })
})
