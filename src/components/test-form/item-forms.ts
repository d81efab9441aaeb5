import { defineAsyncComponent, type Component } from 'vue'
import type { Procedure } from '#shared/engine/vocabulary.ts'

/**
 * The form of each procedure that tests an item. Each takes `form` (what the service knows for the test) and
 * `corrects`, and emits `recorded` with the stored test.
 */
export const itemForms: Partial<Record<Procedure, Component>> = {
  'heat-test': defineAsyncComponent(() => import('@/components/heat-test/HeatTestRun.vue')),
  'pair-loss': defineAsyncComponent(() => import('./PairLossForm.vue')),
  'open-short-load': defineAsyncComponent(() => import('./OpenShortLoadForm.vue')),
  'antenna-sweep': defineAsyncComponent(() => import('./AntennaSweepForm.vue')),
  'feedline-loss': defineAsyncComponent(() => import('./FeedlineLossForm.vue')),
  'battery-capacity': defineAsyncComponent(() => import('./BatteryCapacityForm.vue')),
  'radio-check': defineAsyncComponent(() => import('./RadioCheckForm.vue')),
  inspection: defineAsyncComponent(() => import('./InspectionForm.vue')),
  calibration: defineAsyncComponent(() => import('./CalibrationForm.vue')),
  'session-check': defineAsyncComponent(() => import('./SessionCheckForm.vue')),
  'boot-and-update': defineAsyncComponent(() => import('./BootAndUpdateForm.vue')),
}
