import { test as base } from '@playwright/test'
import { startProduct, type Product } from './product.ts'

export { expect } from '@playwright/test'
export type { Product } from './product.ts'

interface WorkerFixtures {
  /** The product with the demo group, one for each worker: tests in one file see each other's changes. */
  product: Product
}

/** Browser tests import `test` from here: pages open at the product's own address. */
export const test = base.extend<object, WorkerFixtures>({
  product: [
    async ({}, use) => {
      const product = await startProduct('demo')
      await use(product)
      await product.stop()
    },
    { scope: 'worker' },
  ],
  baseURL: async ({ product }, use) => use(product.url),
})
