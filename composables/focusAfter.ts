/**
 * Makes an edit that takes its own key out of the page, and leaves the focus on the first of the places that is there:
 * otherwise whoever works by keyboard or by ear is back at the top of the page.
 */
export async function focusAfter(edit: () => void, ...places: (() => HTMLElement | null | undefined)[]) {
  edit()
  await nextTick()
  if (document.activeElement !== document.body) return
  for (const place of places) {
    const found = place()
    found?.focus()
    if (found) return
  }
}
