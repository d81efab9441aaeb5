import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import { bringBackItem, retireItem, type getItem } from '#shared/contracts/items.ts'
import { callApi } from '@/api/call-api.ts'
import type { Retirement } from './useRetirement.ts'

/** How an item is retired and brought back. */
export function retirementOfItem(itemId: string): Retirement<ResponseOf<typeof getItem>> {
  const params = { itemId }
  return {
    retire: (reason, version) => callApi(retireItem, { params, body: { reason }, version }),
    bringBack: (version) => callApi(bringBackItem, { params, body: {}, version }),
  }
}
