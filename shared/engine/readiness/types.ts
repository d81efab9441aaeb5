import type { BandRegion } from '../band-edges.ts'
import type { PlainDate } from '../plain-date.ts'
import type { RadioCurrents } from '../procedures/radio-currents.ts'
import type {
  Availability,
  Band,
  Category,
  Condition,
  FindingWord,
  Mode,
  Procedure,
  Verdict,
} from '../vocabulary.ts'

/** Milliseconds since 1970-01-01T00:00Z. */
export type EpochMs = number

/** What a kit kind promises. Watts are the radio's output. */
export interface KitPromise {
  readonly bands: readonly Band[]
  readonly modes: readonly Mode[]
  readonly watts: number | null
  readonly hours: number | null
  /** Share of the time in which a station of the kind transmits, %; absent: see `DEFAULT_TRANSMIT_SHARE`. */
  readonly transmitPercent?: number | null | undefined
}

export interface Position {
  readonly id: string
  readonly name: string
  readonly category: Category
  readonly quantity: number
  readonly vital: boolean
}

/** One finding of a test: about one band, or about the whole thing when `band` is null. */
export interface TestFinding {
  readonly band: Band | null
  readonly finding: FindingWord
  /** What was judged: `efficiency`, `peakC`, `swr`, `lossDb`, `watts`, `capacityFraction`, `present`... */
  readonly measure: string
  readonly value: number | null
  /** Expanded uncertainty (k = 2) of `value`, in its unit; null where the instrument's accuracy is not known. */
  readonly uncertainty: number | null
  /** Heat test: the power that was applied, W. */
  readonly powerW: number | null
  /** Counts: the position that was looked at. */
  readonly positionId: string | null
  /** The limit in words, as it was judged: "85 °C at 50 W for 10 min". */
  readonly limit: string
  /** The finding as a sentence without its subject: "reached 85 °C after 8.2 min". */
  readonly text: string
}

/** A test as readiness sees it; superseded tests are left out before. */
export interface Evidence {
  readonly id: string
  readonly procedure: Procedure
  /** The item or kit that was tested. */
  readonly subjectId: string
  readonly performedAt: EpochMs
  readonly performedOn: PlainDate
  /** When it reached the record; evidence counts from here on. */
  readonly recordedAt: EpochMs
  readonly instrumentId: string | null
  readonly finding: FindingWord
  readonly findings: readonly TestFinding[]
  /** Radio check: the supply currents that were read. */
  readonly currents?: RadioCurrents | null
}

/** What of an item's own fields decides; absent means not entered. */
export interface ItemFacts {
  readonly bands?: readonly Band[]
  readonly ratedWatts?: number
  readonly ratedAh?: number
  readonly chemistry?: string
  /** Rated current of a lead, fuse or supply, A. */
  readonly ratedA?: number
  /** Radio: current by power setting, A at W. */
  readonly drawA?: readonly { readonly watts: number; readonly amps: number }[]
  /** Radio: current while receiving, A. */
  readonly receiveA?: number
  /** Kit's mean load at the duty of its kind, A, as somebody wrote it down. */
  readonly meanLoadA?: number
  /** Battery: continuous current that it is rated for, A. */
  readonly maxA?: number
  /** Computer: power that it takes from the station's battery, W. */
  readonly supplyW?: number
  /** Total loss radio to antenna per band with the antenna's SWR included, dB, where it was entered. */
  readonly lossDb?: Partial<Record<Band, number>>
  readonly acquiredOn?: PlainDate
}

export interface ReadinessItem {
  readonly id: string
  readonly designation: string
  readonly category: Category
  readonly positionId: string | null
  readonly condition: Condition
  readonly conditionReason: string
  readonly facts: ItemFacts
  /** When it came into its position; absent: not known. */
  readonly placedAt?: EpochMs | null
}

/** A rule of the policy in force; see `appliesTo` for which items it means. */
export interface Rule {
  readonly id: string
  readonly category: Category | 'kit'
  readonly procedure: Procedure
  readonly intervalMonths: number | null
  readonly warningDays: number
  readonly vital: boolean
  /** Conditions on the item, all of which must hold: chemistry, minAgeYears, bands. */
  readonly applies: Readonly<Record<string, unknown>>
  /** Limits by name, with the unit in the name: maxC, minEfficiency, maxSwr, minCapacityFraction... */
  readonly limits: Readonly<Record<string, unknown>>
}

export interface Policy {
  readonly id: string
  readonly name: string
  /** Local midnight at which it takes effect. */
  readonly effectiveFrom: EpochMs
  readonly rules: readonly Rule[]
  readonly settings: PolicySettings
}

/** Settings of a policy that are not limits of one procedure. */
export interface PolicySettings {
  /** Usable fraction of the measured capacity by chemistry; absent: the engine's defaults. */
  readonly usableFraction?: Readonly<Record<string, number>>
  /** Temperature at which endurance is stated, °C. */
  readonly enduranceC?: number
  /** Peukert exponent for lead-acid; 1 means linear. */
  readonly peukert?: number
  /** Capacity at `enduranceC` as a fraction of the tested one; absent: by chemistry (calculation sheet, section 10). */
  readonly temperatureFactor?: number
  /** Whose band edges count; absent: see `DEFAULT_REGION`. */
  readonly bandRegion?: BandRegion
}

/** A check asked for by an event. */
export interface RaisedCheck {
  readonly id: string
  readonly subjectId: string
  readonly procedure: Procedure
  readonly band: Band | null
  readonly reason: string
  /** A recall: what was found before it is in doubt for this band until tested anew. */
  readonly doubtsEarlier: boolean
  readonly raisedAt: EpochMs
  readonly dueOn: PlainDate
}

export interface Decision {
  readonly id: string
  readonly kind: 'lowered' | 'risk-accepted'
  readonly toVerdict: Verdict | null
  readonly reason: string
  readonly by: string
  readonly from: EpochMs
  readonly until: EpochMs | null
}

/** Everything the timeline of one kit depends on. */
export interface KitState {
  readonly kit: {
    readonly id: string
    readonly designation: string
    readonly availability: Availability
    readonly availabilityReason: string
    readonly sealMatches: boolean
    /** When the kit went out on issue, where it is `assigned`; absent: not known. */
    readonly assignedAt?: EpochMs | null
  }
  readonly promise: KitPromise
  readonly positions: readonly Position[]
  readonly items: readonly ReadinessItem[]
  /** Tests of the kit, of its items and the calibrations of the instruments they name; newest last. */
  readonly evidence: readonly Evidence[]
  readonly instruments: readonly {
    readonly id: string
    readonly designation: string
    readonly category: Category
  }[]
  readonly raisedChecks: readonly RaisedCheck[]
  readonly decisions: readonly Decision[]
  /** All versions, oldest first. */
  readonly policies: readonly Policy[]
  readonly zone: string
}
