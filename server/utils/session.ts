import { clearUserSession, getUserSession, replaceUserSession } from '#cookie-session'
import { getQuery, getRouterParam } from 'h3'
import type { H3Event } from 'h3'
import { nobody, readSession, readWallLink } from '~~/server/services/sessions'
import type { Access } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'

declare module '#auth-utils' {
  interface SecureSessionData {
    token: string
  }
}

/** Puts a session's secret into the sealed cookie. `secure` is the part that is never sent to scripts. */
export async function rememberSession(event: H3Event, token: string) {
  await replaceUserSession(event, { secure: { token } })
}

export async function forgetSession(event: H3Event) {
  await clearUserSession(event)
}

/** Who the cookie of this request stands for. A request without one is not given one. */
export async function findAccess(event: H3Event, db: Database, now: number): Promise<Access> {
  if (!event.headers.get('cookie')?.includes('stillwet=')) return nobody
  const { secure } = await getUserSession(event)
  return secure?.token ? readSession(db, secure.token, now) : nobody
}

/** The secret of a wall link, from the path (`/api/wall/[token]/...`) or the query (`?wall=`). */
export function findWallToken(event: H3Event): string | null {
  const { wall } = getQuery(event)
  return getRouterParam(event, 'token') ?? (typeof wall === 'string' ? wall : null)
}

/** What a wall link's bearer is: no person, one studio. */
export function readWall(db: Database, token: string): Access | null {
  const studio = readWallLink(db, token)
  return studio && { ...nobody, studio }
}
