import { createHmac, randomBytes } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { serverKey } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'

const keyName = 'delivery seed'

/** The installation's own secret for naming deliveries, made on first use. */
export function deliverySeed(db: Database | Transaction): string {
  const find = () => db.select().from(serverKey).where(eq(serverKey.name, keyName)).get()?.value
  const made = find()
  if (made) return made
  db.insert(serverKey).values({ name: keyName, value: randomBytes(32).toString('base64url') }).onConflictDoNothing().run()
  return find() ?? ''
}

/**
 * The name of one sending: the same cause, stage, repeat and endpoint always give the same one, even after the
 * database was put back from a copy, so that a receiver can tell a repeat from a second call.
 * @returns 32 characters of URL-safe base64 (24 bytes of HMAC-SHA-256), which fits a push Topic (RFC 8030, section 5.4)
 */
export function stableIdOf(seed: string, words: readonly (string | number)[]): string {
  return createHmac('sha256', seed).update(JSON.stringify(words)).digest().subarray(0, 24).toString('base64url')
}
