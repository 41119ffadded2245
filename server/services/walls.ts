import { eq, isNull } from 'drizzle-orm'
import { wallLink } from '~~/db/schema'
import { stillListed } from '~~/server/services/still-listed'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { newToken } from '~~/server/utils/token'
import type { WallLinkWire } from '#shared/schemas/wall-link'

const iso = (at: number | null) => at === null ? null : new Date(at).toISOString()

/** Makes a secret address for the handling sheet; it is told once and only its hash is kept. */
export function createWallLink(db: Database, studioId: number, name: string, now: number): { ok: true, id: number, token: string } {
  const { token, hash } = newToken()
  const { id } = db.insert(wallLink).values({ studioId, name, tokenHash: hash, madeAt: now }).returning({ id: wallLink.id }).get()
  return { ok: true, id, token }
}

/** All links that stand, and those ended of late. */
export function listWallLinks(db: Database, studioId: number, now: number): WallLinkWire[] {
  return db.select().from(wallLink).where(scoped(wallLink, studioId, stillListed(wallLink.revokedAt, now))).orderBy(wallLink.id).all()
    .map(({ id, name, madeAt, revokedAt }) => ({ id, name, madeAt: new Date(madeAt).toISOString(), revokedAt: iso(revokedAt) }))
}

/** Makes a link open nothing any more; a page that shows it goes blank with the next beat. */
export function revokeWallLink(db: Database, studioId: number, id: number, now: number): { ok: true } | Refusal {
  const done = db.update(wallLink).set({ revokedAt: now }).where(scoped(wallLink, studioId, eq(wallLink.id, id), isNull(wallLink.revokedAt))).run()
  return done.changes > 0 ? { ok: true } : absent()
}
