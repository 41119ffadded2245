/** After a form was not taken: the focus goes to the first of its fields that says why. */
export async function focusWrong(form: HTMLElement | null) {
  await nextTick()
  form?.querySelector<HTMLElement>('[aria-invalid="true"], [data-wrong] input')?.focus()
}
