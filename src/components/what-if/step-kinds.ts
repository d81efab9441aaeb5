import type { WhatIfStepBody } from '#shared/contracts/what-if.ts'

/** What can be added, what people ask for most first. */
export const STEP_KINDS: readonly { readonly kind: WhatIfStepBody['kind']; readonly label: string }[] = [
  { kind: 'move', label: 'Put an item into a kit' },
  { kind: 'take-out', label: 'Take an item out of a kit' },
  { kind: 'skip', label: 'Skip a test' },
  { kind: 'pass', label: 'A test is made and passes' },
  { kind: 'count', label: 'Count a kit' },
  { kind: 'buy', label: 'Buy a part' },
  { kind: 'find', label: 'A missing item is brought back' },
  { kind: 'back', label: 'A kit is available again' },
]
