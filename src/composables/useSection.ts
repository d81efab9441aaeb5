import { useRoute, useRouter } from 'vue-router'

/** Whether the page that is open lies within a section: the item's page within the items. The board holds no others. */
export function useSection() {
  const route = useRoute()
  const router = useRouter()
  return {
    isWithin(name: string): boolean {
      const { path } = router.resolve({ name })
      return path !== '/' && (route.path === path || route.path.startsWith(`${path}/`))
    },
  }
}
