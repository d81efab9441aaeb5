import { onBeforeUnmount, onMounted, shallowRef, type Ref, type ShallowRef } from 'vue'

interface NearWindow {
  readonly near: Readonly<ShallowRef<boolean>>
  /** Height that it had when it was last drawn, px. */
  readonly heightPx: Readonly<ShallowRef<number>>
}

/** Within this distance of the window something is drawn: one window's height both ways. */
const MARGIN = '100% 0px'

/** Whether an element is in or near the window; before printing everything is. Off: always near. */
export function useNearWindow(
  element: Ref<HTMLElement | null>,
  on: () => boolean,
  estimatePx: number,
): NearWindow {
  const near = shallowRef(!on())
  const heightPx = shallowRef(estimatePx)
  let observer: IntersectionObserver | undefined
  const drawAll = () => void (near.value = true)

  onMounted(() => {
    if (!on() || !element.value) return
    observer = new IntersectionObserver(
      (entries) => {
        const entry = entries.at(-1)
        if (!entry) return
        if (near.value && !entry.isIntersecting) heightPx.value = entry.boundingClientRect.height
        near.value = entry.isIntersecting
      },
      { rootMargin: MARGIN },
    )
    observer.observe(element.value)
    window.addEventListener('beforeprint', drawAll)
  })
  onBeforeUnmount(() => {
    observer?.disconnect()
    window.removeEventListener('beforeprint', drawAll)
  })
  return { near, heightPx }
}
