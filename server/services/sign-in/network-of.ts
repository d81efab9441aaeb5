import { isIPv6 } from 'node:net'

/**
 * What counts as one address: an IPv4 address whole, an IPv6 address by its first 64 bits, since one line has 2^64 of
 * them to choose from (RFC 6177).
 */
export function networkOf(address: string): string {
  const plain = address.replace(/^::ffff:(?=\d+\.\d+\.\d+\.\d+$)/i, '').replace(/%.*$/, '')
  if (!isIPv6(plain)) return plain
  const [head = '', tail = ''] = plain.toLowerCase().split('::')
  const front = head === '' ? [] : head.split(':')
  const back = tail === '' ? [] : tail.split(':')
  const zeros = plain.includes('::')
    ? Array<string>(Math.max(0, 8 - front.length - back.length)).fill('0')
    : []
  const groups = [...front, ...zeros, ...back].slice(0, 4)
  return `${groups.map((group) => group.replace(/^0+(?=.)/, '')).join(':')}::/64`
}
