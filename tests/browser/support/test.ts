import { test as base } from '@playwright/test'
import { startProduct, type Product } from './product.ts'

export { expect } from '@playwright/test'
export type { Product } from './product.ts'

interface TestFixtures {
  /** The product with the demo group, one for each file: tests in one file see each other's changes, others' never. */
  product: Product
}

interface WorkerFixtures {
  productOf: (file: string) => Promise<Product>
}

/** Browser tests import `test` from here: pages open at the product's own address. */
export const test = base.extend<TestFixtures, WorkerFixtures>({
  productOf: [
    async ({}, use) => {
      let running: { file: string; product: Product } | undefined
      await use(async (file) => {
        if (running?.file !== file) {
          await running?.product.stop()
          running = undefined
          running = { file, product: await startProduct('demo') }
        }
        return running.product
      })
      await running?.product.stop()
    },
    { scope: 'worker' },
  ],
  product: async ({ productOf }, use, { file }) => use(await productOf(file)),
  baseURL: async ({ product }, use) => use(product.url),
})
