import type { z } from 'zod'
import type { raiseCheck } from '#shared/contracts/raised-checks.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Availability, Band, Condition } from '#shared/engine/vocabulary.ts'
import type { BatchKey, BuildKey } from './builds.ts'
import type { Local } from './calendar.ts'
import type { DemoTest } from './demo-test.ts'
import type { DemoItem } from './items.ts'
import type { KindCode } from './kit-kinds.ts'
import type { PersonKey } from './people.ts'
import type { PlaceKey } from './places.ts'

type Cause = z.input<typeof raiseCheck.body>['cause']

/** An event asks for a check. `name` is what it is taken back by. */
export interface AskForCheck {
  readonly do: 'ask-for-check'
  readonly name: string
  readonly subject: string
  readonly procedure: z.input<typeof raiseCheck.body>['procedure']
  readonly band?: Band
  readonly cause: Cause
  readonly reason: string
  readonly doubtsEarlier?: boolean
  readonly dueOn: PlainDate
}

/** Columns that people change on a kit, by the scenario's own names. */
export interface KitChanges {
  readonly place?: PlaceKey | null
  readonly sealNumber?: string | null
  readonly sealMatches?: boolean
  readonly notes?: string
}

/** What one member did. Things and people are called by their names; days are those of the scenario. */
export type Deed =
  | { readonly do: 'put-policy-in-force' }
  | { readonly do: 'enrol'; readonly person: PersonKey }
  | { readonly do: 'note-about'; readonly person: PersonKey; readonly notes: string }
  | { readonly do: 'add-place'; readonly place: PlaceKey }
  | { readonly do: 'change-place'; readonly place: PlaceKey; readonly access: string }
  | { readonly do: 'add-kind'; readonly kind: KindCode }
  | { readonly do: 'add-build-sheet'; readonly sheet: BuildKey }
  | { readonly do: 'add-batch'; readonly batch: BatchKey }
  | { readonly do: 'add-kit'; readonly kit: string }
  | { readonly do: 'add-item'; readonly item: DemoItem }
  | { readonly do: 'add-consumable'; readonly consumable: string }
  | {
      readonly do: 'change-stock'
      readonly consumable: string
      readonly lot: string
      readonly difference: string
      readonly reason: string
    }
  | { readonly do: 'note-lot'; readonly consumable: string; readonly lot: string; readonly condition: string }
  | {
      readonly do: 'pack'
      readonly item: string
      readonly kit: string
      readonly position: string
      readonly reason?: string
    }
  | { readonly do: 'shelve'; readonly item: string; readonly place: PlaceKey; readonly reason: string }
  | {
      readonly do: 'set-condition'
      readonly item: string
      readonly condition: Condition
      readonly reason: string
    }
  | { readonly do: 'retire-item'; readonly item: string; readonly reason: string }
  | { readonly do: 'change-kit'; readonly kit: string; readonly changes: KitChanges }
  | {
      readonly do: 'set-availability'
      readonly kit: string
      readonly availability: Availability
      readonly reason?: string
      readonly expectedReturnOn?: PlainDate
      readonly holder?: PersonKey
    }
  | { readonly do: 'test'; readonly test: DemoTest }
  | AskForCheck
  | { readonly do: 'take-back-check'; readonly name: string; readonly reason: string }
  | {
      readonly do: 'recall'
      readonly batch: BatchKey
      readonly band: Band
      readonly reason: string
      readonly dueOn: PlainDate
    }

/** A deed with who did it and when it reached the record. */
export interface Step {
  readonly at: Local
  readonly by: PersonKey
  readonly deed: Deed
}
