import { computed } from 'vue'
import { useRoute, useRouter, type LocationQuery } from 'vue-router'
import type { z } from 'zod'

/** A list's search, filters, order and page by the names of its contract; what is not there is at its default. */
export type ListValues = Readonly<Record<string, string>>

/** Keeps what a list shows in the address, so that going back, loading again and sending the address all work. */
export function useListAddress(shape: z.ZodRawShape) {
  const route = useRoute()
  const router = useRouter()
  const values = computed(() => readValues(shape, route.query))

  /** An empty value takes its name out of the address. `typing` replaces the entry of the history it stands in. */
  function change(part: ListValues, typing = false): void {
    const query = withoutEmpty({ ...othersIn(shape, route.query), ...values.value, ...part })
    void (typing ? router.replace({ query }) : router.push({ query }))
  }

  return { values, change }
}

/** What the contract refuses is left out: an old or mistyped address still shows the list. */
export function readValues(shape: z.ZodRawShape, query: LocationQuery): ListValues {
  const given = Object.keys(shape).map((name) => [name, one(query[name])] as const)
  return Object.fromEntries(
    given.filter(([name, value]) => {
      const schema = shape[name] as z.ZodType | undefined
      return name !== 'size' && value !== '' && schema?.safeParse(value).success
    }),
  )
}

/** What else a page keeps in its address stays there. */
function othersIn(shape: z.ZodRawShape, query: LocationQuery): ListValues {
  const names = Object.keys(query).filter((name) => !(name in shape))
  return Object.fromEntries(names.map((name) => [name, one(query[name])]))
}

function withoutEmpty(values: ListValues): ListValues {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== ''))
}

function one(value: LocationQuery[string] | undefined): string {
  const first = Array.isArray(value) ? value[0] : value
  return first ?? ''
}
