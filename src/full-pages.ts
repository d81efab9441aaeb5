import { PiniaColada } from '@pinia/colada'
import PrimeVue from 'primevue/config'
import type { App } from 'vue'
import { preset } from './theme.ts'

/**
 * Installs the component library and the query cache. The router loads this file before the first page that is not
 * marked `light`.
 */
export function installFullPages(app: App): void {
  app.use(PiniaColada, { queryOptions: { staleTime: 5_000, gcTime: 300_000 } })
  app.use(PrimeVue, {
    theme: {
      preset,
      options: { prefix: 'p', darkModeSelector: '[data-theme="night"]', cssLayer: false },
    },
  })
}
