import PrimeVue from 'primevue/config'
import type { App } from 'vue'
import 'primeicons/primeicons.css'
import { preset } from './theme.ts'

/** Installs the component library. The router loads this file before the first page that is not marked `light`. */
export function installPrimeVue(app: App): void {
  app.use(PrimeVue, {
    theme: {
      preset,
      options: { prefix: 'p', darkModeSelector: '[data-theme="night"]', cssLayer: false },
    },
  })
}
