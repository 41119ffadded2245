/** What a browser tells of where a request comes from. */
export interface RequestSource { origin: string | null, fetchSite: string | null, host: string | null, publicUrl: string | null }

/**
 * Whether a request that changes something comes from our own pages, or from no page at all (a script, a sensor).
 * SameSite cookies keep other sites out already; this also keeps out another port of the same machine.
 */
export function isOwnOrigin({ origin, fetchSite, host, publicUrl }: RequestSource): boolean {
  if (origin === null) return fetchSite === null || fetchSite === 'same-origin' || fetchSite === 'none'
  if (!URL.canParse(origin)) return false
  const given = new URL(origin)
  return given.host === host || (publicUrl !== null && given.origin === new URL(publicUrl).origin)
}
