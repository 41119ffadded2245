import { clearUserSession, getUserSession, replaceUserSession } from '#cookie-session'
import { useRuntimeConfig } from 'nitropack/runtime'
import { getCookie, getQuery, getRouterParam, setCookie } from 'h3'
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

const benchCookie = 'stillwet-bench'
// The longest that browsers keep a cookie: a tablet is ended in the settings, not by time.
const benchSeconds = 400 * 24 * 60 * 60

/** Puts a bench tablet's secret into a cookie of its own, so that it never stands for a person. */
export function rememberBench(event: H3Event, token: string) {
  const { secure } = useRuntimeConfig(event).session.cookie as { secure: boolean }
  setCookie(event, benchCookie, token, { httpOnly: true, sameSite: 'lax', secure, path: '/', maxAge: benchSeconds })
}

/** The secret of the bench tablet that asks, or null. */
export const findBenchToken = (event: H3Event): string | null => getCookie(event, benchCookie) ?? null

/** Whether a page asks as the bench tablet it runs on, whoever else is signed in at the same browser. */
export const asksAsBench = (event: H3Event) => getQuery(event).bench === '1'
