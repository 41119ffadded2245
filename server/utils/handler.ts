import { randomUUID } from 'node:crypto'
import { createError, defineEventHandler, getHeader, getQuery, getRouterParams, isError, readBody, readFormData, setResponseHeader } from 'h3'
import type { EventHandlerRequest, H3Event } from 'h3'
import { core } from 'zod/mini'
import { readBench } from '~~/server/services/bench-access'
import type { Access, Bench, Membership, SignedIn, StudioRow } from '~~/server/services/sessions'
import { useDatabase } from '~~/server/utils/database'
import type { Database } from '~~/server/utils/database'
import { absent, isRefusal, malformed, notAllowed, notSignedIn, toHttp } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { loggedPath } from '~~/server/utils/logged-path'
import { asksAsBench, findAccess, findBenchToken, findWallToken, readWall } from '~~/server/utils/session'
import { may } from '#shared/permissions'
import type { Permission } from '#shared/permissions'
import { describeIssues } from '#shared/schemas/describe'
import { benchRefusals } from '#shared/words/bench-refusals'
import { refusals } from '#shared/words/refusals'

declare module 'h3' {
  interface H3EventContext {
    /** Set once a route has asked who may; an answer without it is withheld. */
    accessChecked?: boolean
  }
}

/**
 * Who may use a route: a permission of a member, anybody at all, anybody signed in (even without a studio), a bench tablet,
 * or a wall link's bearer as well as every member and every bench tablet.
 */
export type May = Permission | 'anyone' | 'signed in' | 'wall' | 'bench'

interface Known { sessionHash: string, person: SignedIn }
interface Within extends Known { studio: StudioRow, member: Membership }

type AccessFor<M extends May> =
  M extends 'anyone' ? Access
    : M extends 'signed in' ? Known & Pick<Access, 'studio' | 'member'>
      : M extends 'wall' ? Access & { studio: StudioRow }
        : M extends 'bench' ? { studio: StudioRow, bench: Bench }
          : Within

type Schema = core.$ZodType
type Parsed<S> = S extends Schema ? core.output<S> : undefined

export type Context<M extends May, P = undefined, Q = undefined, B = undefined> = AccessFor<M> & {
  db: Database
  /** The instant of the request, milliseconds UTC. */
  now: number
  params: P
  query: Q
  body: B
  event: H3Event
}

interface Route<M extends May, P, Q, B, R> {
  may: M
  params?: P
  query?: Q
  body?: B
  run: (context: Context<M, Parsed<P>, Parsed<Q>, Parsed<B>>) => R | Promise<R>
}

/** What reaches the client: refusals leave as HTTP errors. */
type Answer<R> = Exclude<R, Refusal>

const checkMember = ({ person, studio, member }: Access, permission: Permission): Refusal | null => {
  if (!person) return notSignedIn()
  if (!studio || !member) return notAllowed(refusals.noStudio)
  return may(member.role, permission) ? null : notAllowed()
}

function checkAccess(access: Access, wanted: May): Refusal | null {
  if (wanted === 'anyone') return null
  if (wanted === 'signed in') return access.person ? null : notSignedIn()
  if (wanted === 'bench') return access.bench ? null : notSignedIn(benchRefusals.notPaired)
  if (wanted === 'wall') return access.studio && !access.person ? null : checkMember(access, 'read the studio')
  return checkMember(access, wanted)
}

function find(event: H3Event, db: Database, wanted: May, now: number): Access | null | Promise<Access> {
  if (wanted === 'bench' || (wanted === 'wall' && asksAsBench(event))) return readBench(db, findBenchToken(event), now)
  const token = wanted === 'wall' ? findWallToken(event) : null
  return token === null ? findAccess(event, db, now) : readWall(db, token)
}

async function admit(event: H3Event, db: Database, wanted: May, now: number): Promise<Access> {
  const access = await find(event, db, wanted, now)
  const refusal = access ? checkAccess(access, wanted) : absent()
  if (refusal || !access) throw toHttp(refusal ?? absent())
  event.context.accessChecked = true
  return access
}

function parse<S>(schema: S | undefined, value: unknown, refuse: (fields: Record<string, string>) => Refusal) {
  if (!(schema instanceof core.$ZodType)) return undefined as Parsed<S>
  const result = core.safeParse<Schema>(schema, value)
  if (!result.success) throw toHttp(refuse(describeIssues(result.error.issues)))
  return result.data as Parsed<S>
}

/** JSON or form fields of either encoding: what sends figures from a shelf is often no browser. */
async function readFields(event: H3Event): Promise<unknown> {
  try {
    if (getHeader(event, 'content-type')?.startsWith('multipart/form-data')) return Object.fromEntries(await readFormData(event))
    return await readBody<unknown>(event, { strict: true })
  }
  catch {
    throw toHttp(malformed({ form: refusals.notFields }, refusals.notFields))
  }
}

/** Logs what nobody foresaw once, under a number the person is given, and shows nothing of it. */
function noteUnexpected(event: H3Event, error: unknown) {
  const requestId = randomUUID().slice(0, 8)
  console.error(`[${requestId}] ${event.method} ${loggedPath(event.path)}`, error)
  return createError({ statusCode: 500, statusMessage: 'unexpected', message: refusals.unexpected(requestId), data: { reason: 'unexpected', message: refusals.unexpected(requestId), requestId } })
}

/**
 * Builds a route: asks who may, parses what came, calls `run` once, and turns a service's refusal into HTTP.
 * A number in the path that cannot be read is absent (404); a bad query or body is malformed (400).
 * @throws H3Error with `data: { reason, message, fields?, current? }`
 */
export function defineStudioHandler<M extends May, R, P extends Schema | undefined = undefined, Q extends Schema | undefined = undefined, B extends Schema | undefined = undefined>(route: Route<M, P, Q, B, R>) {
  return defineEventHandler<EventHandlerRequest, Promise<Answer<R>>>(async (event) => {
    try {
      const now = Date.now()
      const db = useDatabase()
      const access = await admit(event, db, route.may, now)
      setResponseHeader(event, 'cache-control', 'no-store')
      const params = parse(route.params, getRouterParams(event, { decode: true }), () => absent())
      const query = parse(route.query, getQuery(event), malformed)
      const body = parse(route.body, route.body ? await readFields(event) : undefined, malformed)
      // `admit` has just proved what AccessFor promises for this route.
      const answer = await route.run({ ...access as AccessFor<M>, db, now, params, query, body, event })
      if (isRefusal(answer)) throw toHttp(answer)
      return answer as Answer<R>
    }
    catch (error) {
      throw isError(error) ? error : noteUnexpected(event, error)
    }
  })
}
