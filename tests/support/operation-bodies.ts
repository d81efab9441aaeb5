import { inspection } from './evidence.ts'
import type { Ids } from './operations.ts'

const WEATHER = {
  reason: 'Storm',
  dueOn: '2026-06-10',
  placeIds: [],
  onIssue: true,
  doubtsEarlier: false,
}

/** Bodies where the schema alone does not tell what is valid. */
export const BODIES: Readonly<Record<string, (ids: Ids) => object>> = {
  'ask-what-if': (ids) => ({ steps: [{ kind: 'count', kitId: ids('kitId') }] }),
  'change-stock': () => ({ difference: '1', reason: 'Bought' }),
  'do-what-if': (ids) => ({ steps: [{ kind: 'count', kitId: ids('kitId') }], reason: 'Storm' }),
  'move-item': (ids) => ({
    moveId: ids('moveId'),
    from: { kind: 'nowhere' },
    to: { kind: 'place', placeId: ids('placeId') },
  }),
  'plan-work-party': () => ({ people: 2, minutes: 60 }),
  'print-tag-sheet': (ids) => ({
    selection: { kind: 'chosen', kitIds: [ids('kitId')], itemIds: [] },
    format: { kind: 'sheet', paper: 'a4', size: 'lid' },
  }),
  'preview-weather': () => WEATHER,
  'raise-check': (ids) => ({
    procedure: 'inspection',
    itemId: ids('itemId'),
    cause: 'drop',
    reason: 'It fell off the tailgate',
    dueOn: '2026-06-10',
  }),
  'raise-recall': () => ({ band: null, reason: 'A sibling failed', dueOn: '2026-06-10' }),
  'record-exposure': (ids) => ({
    recordId: ids('recordId'),
    emission: 'carrier',
    onMinutes: 5,
    offMinutes: 5,
    gainDbi: 2.15,
  }),
  'raise-weather': (ids) => ({ ...WEATHER, eventId: ids('eventId') }),
  'record-test': (ids) => inspection(ids('itemId'), '2026-05-01T12:00:00Z'),
}
