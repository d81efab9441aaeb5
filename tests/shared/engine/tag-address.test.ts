import { describe, expect, it } from 'vitest'
import { tagAddress, tagInAddress } from '#shared/engine/tag-address.ts'

describe('tagAddress', () => {
  it.each([
    ['https://kits.example.org', 'HTTPS://KITS.EXAMPLE.ORG/T/XF3M9PM'],
    ['http://127.0.0.1:8080', 'HTTP://127.0.0.1:8080/T/XF3M9PM'],
    ['https://example.org/halyard', 'https://example.org/halyard/t/XF3M9PM'],
  ])('writes %s in as few bits as its path allows', (publicUrl, address) => {
    expect(tagAddress(publicUrl, 'XF3M9PM')).toBe(address)
  })
})

describe('tagInAddress', () => {
  it.each([
    ['HTTPS://KITS.EXAMPLE.ORG/T/XF3M9PM', 'XF3M9PM'],
    ['https://old.example.org/halyard/t/xf3m9pm', 'XF3M9PM'],
    [' http://localhost:1/t/KT4Z76/ ', 'KT4Z76'],
    ['XF3M9PM', undefined],
    ['https://example.org/about', undefined],
    ['javascript:/t/KT4Z76', undefined],
  ])('finds in %j the tag %j', (text, tag) => {
    expect(tagInAddress(text)).toBe(tag)
  })
})
