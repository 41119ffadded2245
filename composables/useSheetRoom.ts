/** The room a tablet hangs in, kept by the device; null shows all of them. A cookie, so that the first paint is right. */
export function useSheetRoom() {
  return useCookie<number | null>('stillwet-sheet-room', { default: () => null, maxAge: 60 * 60 * 24 * 365, sameSite: 'lax' })
}
