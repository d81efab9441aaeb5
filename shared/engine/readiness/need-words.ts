import { counted, listText } from '../plain-words.ts'
import type { Mode } from '../vocabulary.ts'
import { causesOf } from './need-nearness.ts'
import type { Need, Shortfall } from './need.ts'
import { amountText, shortText, type Tense } from './words.ts'

/** The words of the answer to a need, all in one place. */

const MODE_WORDS: Readonly<Record<Mode, string>> = {
  voice: 'by voice',
  digital: 'in digital modes',
  relay: 'as a relay',
}

interface Lacking {
  readonly shortfalls: readonly Shortfall[]
  readonly need: Need
  /** The reason that weighs most on the kit's verdict, empty when there is none. */
  readonly reasonTop: string
  /** Names of the place asked for and of the kit's own, where they are known. */
  readonly places: { readonly asked: string | null; readonly has: string | null }
  readonly tense: Tense
}

/** What would have to be so, and what is: `it gave 60 W on 40 m: 42 W now`. It follows the words "could if". */
export function missingText({ shortfalls, need, reasonTop, places, tense }: Lacking): string {
  const causes = causesOf(shortfalls)
  const [first] = causes
  if (!first) return ''
  const now = tense === 'now' ? 'now' : 'then'
  switch (first.kind) {
    case 'watts':
    case 'hours':
      return amountsText(causes.filter((one) => one.kind === first.kind) as Amount[], now)
    case 'band':
      return `${bandsText(causes, need)}: ${first.state === 'out' ? 'out' : 'not proven'} ${now}`
    case 'verdict':
      return `it were ${first.verdict === 'not-fit' ? 'fit' : 'proven'}${alsoText(shortfalls, need)}${because(reasonTop)}`
    case 'availability':
      return first.availability === 'assigned'
        ? `it were back: out on issue ${now}`
        : `it were in service: out of service ${now}`
    case 'mode':
      return `it worked ${MODE_WORDS[first.mode]}: it does not ${now}`
    case 'place':
      return `it were at ${places.asked ?? 'that place'}: ${places.has === null ? 'place not known' : `at ${places.has} ${now}`}`
    case 'not-built':
      return 'it were built for that'
  }
}

type Amount = Extract<Shortfall, { readonly kind: 'watts' | 'hours' }>

function amountsText(amounts: readonly Amount[], now: string): string {
  const [first] = amounts
  if (!first) return ''
  const has = [...new Set(amounts.map(hasText))]
  if (first.kind === 'hours') return `it ran ${first.needed} h on its own batteries: ${has[0]} ${now}`
  return `it gave ${first.needed} W${onBands(amounts)}: ${listText(has)} ${now}`
}

function hasText({ kind, has, needed }: Amount): string {
  if (has === null) return kind === 'hours' ? 'no hours are proven' : 'not measured'
  // A figure that misses must not be rounded onto what is asked for.
  const rounded = Number(amountText(has)) < needed ? amountText(has) : shortText(has)
  return `${rounded} ${kind === 'hours' ? 'h' : 'W'}`
}

/** Where a band does not stand nobody can say its watts: they are part of the condition. */
function bandsText(shortfalls: readonly Shortfall[], { watts }: Need): string {
  const power = watts === null ? '' : ` and gave ${watts} W there`
  return `it worked${onBands(shortfalls) || ' on a band'}${power}`
}

function alsoText(shortfalls: readonly Shortfall[], need: Need): string {
  const bands = shortfalls.filter(({ kind }) => kind === 'band')
  if (bands.length === 0) return ''
  return `${need.watts === null ? ' and' : ','} ${bandsText(bands, need).slice('it '.length)}`
}

function onBands(shortfalls: readonly Shortfall[]): string {
  const bands = shortfalls.flatMap((one) => ('band' in one && one.band !== null ? [one.band] : []))
  return bands.length === 0 ? '' : ` on ${listText(bands)}`
}

const because = (reason: string) => (reason === '' ? '' : `: ${reason}`)

interface Answered {
  readonly stations: number
  readonly others: number
  /** Nearest first. */
  readonly near: readonly { readonly designation: string; readonly missing: string }[]
  readonly tense: Tense
}

const CAN: Readonly<Record<Tense, string>> = {
  now: 'can do that',
  past: 'could do that',
  future: 'will be able to do that',
}

/** The answer in one sentence, its weighty part apart: `4 stations can do that;` `K-03 could if it gave ...` */
export function needSentence({ stations, others, near, tense }: Answered): { lead: string; rest: string } {
  const counts = [
    stations > 0 && counted(stations, 'station'),
    others > 0 && counted(others, 'other kit'),
  ].filter((part) => part !== false)
  const lead = `${counts.length === 0 ? 'None' : listText(counts)} ${CAN[tense]}`
  const [nearest, ...more] = near
  if (!nearest) return { lead: `${lead}.`, rest: '' }
  const could = tense === 'past' ? 'could have if' : 'could if'
  const also = more.length === 0 ? '' : ` ${more.length} more nearly ${tense === 'past' ? 'could' : 'can'}.`
  return { lead: `${lead};`, rest: `${nearest.designation} ${could} ${nearest.missing}.${also}` }
}
