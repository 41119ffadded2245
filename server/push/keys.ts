import { eq } from 'drizzle-orm'
import webpush from 'web-push'
import { serverKey } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'

/** The pair that names this installation to push services, URL-safe base64. */
export interface PushKeys { publicKey: string, privateKey: string }

const keyName = 'push key pair'

/**
 * The installation's push keys: those that were given, else a pair made once and kept in the database. A new pair
 * would make every subscription worthless, so one that exists is never replaced.
 */
export function pushKeys(db: Database, given: PushKeys | null): PushKeys {
  if (given) return given
  const find = () => db.select().from(serverKey).where(eq(serverKey.name, keyName)).get()
  const made = find()
  if (made) return JSON.parse(made.value) as PushKeys
  db.insert(serverKey).values({ name: keyName, value: JSON.stringify(webpush.generateVAPIDKeys()) }).onConflictDoNothing().run()
  return JSON.parse(find()?.value ?? '') as PushKeys
}
