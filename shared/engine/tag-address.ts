/**
 * The address that a tag's code opens. Scheme and host may be written in capitals (RFC 3986, 6.2.2.1), and this
 * application takes the path `/T/…` like `/t/…`; all in capitals, the code needs 5.5 bits a character instead of 8, so
 * it has fewer and larger modules. A service below a path of its own, whose case we do not decide, keeps small letters.
 */

/** `publicUrl` has no slash at its end. "https://kits.example.org" and "XF3M9PM" give "HTTPS://KITS.EXAMPLE.ORG/T/XF3M9PM". */
export function tagAddress(publicUrl: string, tag: string): string {
  const atRoot = /^https?:\/\/[^/]+$/i.test(publicUrl)
  return atRoot ? `${publicUrl.toUpperCase()}/T/${tag}` : `${publicUrl}/t/${tag}`
}

/** The tag in an address that was scanned, of this service or of another host's time; undefined when there is none. */
export function tagInAddress(text: string): string | undefined {
  return /^https?:\/\/\S+\/t\/([0-9a-z*]+)\/?$/i.exec(text.trim())?.[1]?.toUpperCase()
}
