import { computed } from 'vue'
import { useSessionStore } from '@/stores/session.ts'
import { wallClock } from '@/format/day.ts'
import { useNow } from './useNow.ts'

/** The group's time zone, and today there. Before sign-in: UTC. */
export function useGroupTime() {
  const session = useSessionStore()
  const now = useNow()
  const zone = computed(() => session.member?.group.timeZone ?? 'UTC')
  const today = computed(() => wallClock(now.value, zone.value).day)
  return { zone, today, now }
}
