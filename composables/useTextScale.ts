import { useElementSize } from '@vueuse/core'
import type { Ref } from 'vue'

/**
 * How much larger than usual the words in an element are set, 1 or more: readers choose larger letters, and what is drawn beside
 * words has to make the room for them. Looked at again whenever the element changes its width.
 * @param usual the size its words have while nobody chose another, px
 */
export function useTextScale(element: Readonly<Ref<HTMLElement | null>>, usual: number): Readonly<Ref<number>> {
  const scale = ref(1)
  const look = () => {
    if (element.value) scale.value = Math.max(1, Number.parseFloat(getComputedStyle(element.value).fontSize) / usual)
  }
  const { width } = useElementSize(element)
  onMounted(look)
  watch(width, look)
  return scale
}
