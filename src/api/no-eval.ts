import { config } from 'zod'

/**
 * The page's security policy forbids code from text. Told before the first schema is made, zod does not try it, which
 * the browser would report as a breach. The build puts this file next to zod, so that it runs before every contract.
 */
config({ jitless: true })
