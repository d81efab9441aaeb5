import { defineAsyncComponent, type Component } from 'vue'
import type { KitProcedure } from './kit-procedures.ts'

/** The form of each. Each takes `kit` and `corrects`, and emits `recorded` with the stored test. */
export const kitForms: Readonly<Record<KitProcedure, Component>> = {
  count: defineAsyncComponent(() => import('./CountForm.vue')),
  'on-air-check': defineAsyncComponent(() => import('./OnAirForm.vue')),
}
