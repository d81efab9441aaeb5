import { expect, it } from 'vitest'
import { banner } from '../../scripts/lib/banner.ts'

const facts = {
  url: 'http://localhost:8080',
  mailUrl: 'http://127.0.0.1:8081',
  signIns: [{ address: 'river@example.org', password: 'a long enough secret', role: 'administrator' }],
  folders: ['/home/river/halyard/.halyard/start-1', '/var/tmp/halyard-1/start-1'],
  hasOwnData: true,
}

it('says where everything is and how to get in', () => {
  const text = banner(facts)
  for (const part of [
    facts.url,
    facts.mailUrl,
    'river@example.org  a long enough secret  (administrator)',
    ...facts.folders,
  ]) {
    expect(text).toContain(part)
  }
})

it('says nothing of mails that go out, nor of sign-ins that are not there', () => {
  expect(banner({ ...facts, mailUrl: null, signIns: [] })).not.toMatch(/Mail {3}|Sign in/)
})

it('does not tell to remove data that a named database holds', () => {
  expect(banner({ ...facts, hasOwnData: false })).not.toMatch(/Data|remove/)
})
