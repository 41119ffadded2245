/** What the frame of every page shows of the studio. The live store fills it; until then the frame keeps quiet. */
export interface Shell {
  /** IANA zone of the studio; null before anybody is signed in: then no clock is shown. */
  zone: string | null
  studio: string | null
  /** Set, in ms UTC, to the last word heard once the studio has been silent for five minutes. */
  notHeardSince: number | null
}

export function useShell() {
  return useState<Shell>('shell', () => ({ zone: null, studio: null, notHeardSince: null }))
}
