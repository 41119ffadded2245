import { useIntervalFn, useMediaQuery, useResizeObserver } from '@vueuse/core'
import type { Ref } from 'vue'
import { pagesOf } from '#shared/sheet-pages'

const turnEveryMs = 12_000

/**
 * Pages through what is higher than its box, whole rows at a time, so that no row is ever read half. Turns by itself
 * unless stopped or the reader wants less motion; a box without a height of its own (a phone) has one page.
 * @param box holds the rows as children marked `data-row`
 * @param changes anything whose change moves the rows
 */
export function usePages(box: Readonly<Ref<HTMLElement | null>>, changes: () => unknown) {
  const pages = ref<number[][]>([])
  const page = ref(0)
  const reduced = useMediaQuery('(prefers-reduced-motion: reduce)')
  const stopped = ref(false)
  const turning = computed(() => pages.value.length > 1 && !stopped.value && !reduced.value)

  function measure() {
    if (!box.value) return
    const rows = [...box.value.querySelectorAll<HTMLElement>('[data-row]')].map(row => ({ top: row.offsetTop, height: row.offsetHeight }))
    pages.value = pagesOf(rows, box.value.clientHeight)
    if (page.value >= pages.value.length) page.value = 0
    show()
  }
  function show() {
    const first = pages.value[page.value]?.[0] ?? 0
    const row = box.value?.querySelectorAll<HTMLElement>('[data-row]')[first]
    if (box.value && row) box.value.scrollTop = pages.value.length > 1 ? row.offsetTop : 0
  }
  function turn(by: number) {
    page.value = (page.value + by + pages.value.length) % Math.max(1, pages.value.length)
    show()
  }
  /** A row of another page is not to be read at the edge of this one. */
  const hides = (row: number) => pages.value.length > 1 && !pages.value[page.value]?.includes(row)

  useResizeObserver(box, measure)
  watch(changes, () => void nextTick(measure))
  onMounted(() => void document.fonts.ready.then(measure))
  useIntervalFn(() => turning.value && turn(1), turnEveryMs)

  return { pages, page, turn, hides, stopped, turning, reduced }
}
