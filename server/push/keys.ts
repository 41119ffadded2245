import { eq } from 'drizzle-orm'
import webpush from 'web-push'
import { serverKey } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'

/** The pair that names this installation to push services, URL-safe base64. */
export interface PushKeys { publicKey: string, privateKey: string }

const keyName = 'push key pair'

/**
 * The installation's push keys: from the environment when both halves are given there, else made once and kept in
 * the database. A new pair would make every subscription worthless, so one that exists is never replaced.
 * @throws when only one half is given
 */
export function pushKeys(db: Database, env: { STILLWET_PUSH_PUBLIC_KEY?: string, STILLWET_PUSH_PRIVATE_KEY?: string } = {}): PushKeys {
  const publicKey = env.STILLWET_PUSH_PUBLIC_KEY?.trim()
  const privateKey = env.STILLWET_PUSH_PRIVATE_KEY?.trim()
  if (publicKey && privateKey) return { publicKey, privateKey }
  if (publicKey || privateKey) throw new Error('STILLWET_PUSH_PUBLIC_KEY and STILLWET_PUSH_PRIVATE_KEY belong together: give both or neither.')
  const find = () => db.select().from(serverKey).where(eq(serverKey.name, keyName)).get()
  const made = find()
  if (made) return JSON.parse(made.value) as PushKeys
  db.insert(serverKey).values({ name: keyName, value: JSON.stringify(webpush.generateVAPIDKeys()) }).onConflictDoNothing().run()
  return JSON.parse(find()?.value ?? '') as PushKeys
}
