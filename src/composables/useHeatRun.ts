import { computed, shallowRef, watch } from 'vue'
import type { TestForm } from '#shared/contracts/test-form.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { uuidv7 } from '@/api/new-id.ts'
import {
  hottestC,
  withoutReading,
  withReading,
  type HeatPlan,
  type HeatRun,
  type HeatSetUp,
} from '@/components/heat-test/heat-run.ts'
import { withLog, withoutLog, type PlacedLog } from '@/components/heat-test/log-of-run.ts'
import { keep, readKeptJson } from '@/device-storage.ts'

const keyOf = (itemId: string) => `halyard.heat-test.${itemId}`

/** One heat test of one item, kept on this device until it is recorded or given up. */
export function useHeatRun(form: TestForm) {
  const itemId = form.item.id
  const run = shallowRef<HeatRun>(keptRun(itemId) ?? newRun(form))
  const plan = computed<HeatPlan>(() => planOf(form, run.value.setUp.band))
  watch(run, (value) => keep(keyOf(itemId), JSON.stringify(value)), { immediate: true })

  const change = (changes: Partial<HeatRun>) => void (run.value = { ...run.value, ...changes })

  return {
    run,
    plan,
    hottest: computed(() => hottestC(run.value)),
    setUp: (changes: Partial<HeatSetUp>) =>
      change({ setUp: { ...run.value.setUp, ...powerOfBand(form, changes), ...changes } }),
    change,
    keyDown: () =>
      change({ step: 'keyed', keyDownAt: Date.now(), keyUpAt: null, readings: [], stoppedAtLimit: false }),
    read: (temperatureC: number) => void (run.value = withReading(run.value, temperatureC, Date.now())),
    remove: (place: number) => void (run.value = withoutReading(run.value, place)),
    keyUp: (stoppedAtLimit: boolean) => change({ step: 'cooling', keyUpAt: Date.now(), stoppedAtLimit }),
    takeLog: (log: PlacedLog) => void (run.value = withLog(run.value, log)),
    dropLog: () => void (run.value = withoutLog(run.value)),
    review: () => change({ step: 'review' }),
    /** Begins again with the same set-up and a new id. */
    restart: () => void (run.value = { ...newRun(form), setUp: run.value.setUp }),
    /** It is recorded, or nobody wants it: nothing stays on the device. */
    forget: () => keep(keyOf(itemId), null),
  }
}

function newRun(form: TestForm): HeatRun {
  return {
    testId: uuidv7(),
    step: 'set-up',
    setUp: {
      band: form.bands.at(-1) ?? null,
      powerW: form.heat?.powerW ?? null,
      load: 'fixture-2450',
      enclosure: 'closed',
      ambientC: null,
      method: form.lastMethod ?? form.methods[0]?.name ?? '',
      instrumentId: form.lastInstrument?.id ?? form.instruments[0]?.id ?? '',
      instrumentNote: '',
      conditions: '',
    },
    keyDownAt: null,
    keyUpAt: null,
    readings: [],
    stoppedAtLimit: false,
    swr: { start: null, highest: null, lowest: null },
    notes: '',
  }
}

/** Another band with a rule of its own is tested at the power of that rule. */
function powerOfBand({ bandRules }: TestForm, { band }: Partial<HeatSetUp>): Partial<HeatSetUp> {
  const powerW = band ? bandRules[band]?.heat.powerW : undefined
  return powerW === undefined ? {} : { powerW }
}

/** Without a rule in force the card's customary method stands (common practice, no source). */
function planOf(form: TestForm, band: Band | null): HeatPlan {
  const heat = (band && form.bandRules[band]?.heat) ?? form.heat
  return {
    stopC: heat?.stopC ?? 85,
    minutes: heat?.minutes ?? 10,
    readingMinutes: heat?.readingMinutes ?? [0, 1, 2, 3, 5, 8, 10],
    coolingMinutes: heat?.coolingMinutes ?? [5],
  }
}

function keptRun(itemId: string): HeatRun | null {
  const kept = readKeptJson(keyOf(itemId)) as HeatRun | null
  return kept?.testId && kept.setUp ? kept : null
}
