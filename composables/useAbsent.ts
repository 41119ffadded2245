import type { Ref } from 'vue'

/**
 * Ends in the page of a wrong address where what a page is about is not there: never was, was taken away, or is not one's own.
 * Other failures stay with the page, which offers to try again. The server draws that page for any error; as a fatal one it would be logged as a failure of ours.
 */
export function endWhenAbsent(error: Ref<{ statusCode?: number } | null | undefined>): void {
  if (error.value?.statusCode === 404) throw createError({ statusCode: 404, statusMessage: 'Not Found', fatal: import.meta.client })
}
