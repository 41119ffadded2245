/** Light, dark, or as the device has it (null). A cookie, so that the first paint is already right. */
export function useScheme() {
  const scheme = useCookie<'light' | 'dark' | null>('scheme', { default: () => null, maxAge: 60 * 60 * 24 * 365, sameSite: 'lax' })
  useHead({ htmlAttrs: { 'data-scheme': () => scheme.value ?? undefined } })
  return scheme
}
