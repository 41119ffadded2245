import { defineNitroPlugin } from 'nitropack/runtime'
import cron from 'node-cron'
import { studio } from '~~/db/schema'
import { isAnyToLookAt, notePromise } from '~~/server/planning/promise-watch'
import { tellingListener } from '~~/server/reminders/wanted'
import { useAsker } from '~~/server/utils/asker'
import { useDatabase } from '~~/server/utils/database'
import { isRefusal } from '~~/server/utils/errors'
import { whenReady } from '~~/server/utils/ready'

/** One studio after another: a promise that begins to slip is called at the next look at the calls. */
async function lookRound() {
  const db = useDatabase()
  for (const { id } of db.select({ id: studio.id }).from(studio).all()) {
    if (!isAnyToLookAt(db, id, Date.now())) continue
    const reckoned = await useAsker().ask(db, 'promises', { studioId: id }, Date.now())
    if (isRefusal(reckoned)) continue
    for (const each of reckoned) notePromise(db, id, each, Date.now())
    if (reckoned.length > 0) tellingListener(db, id, Date.now())
  }
}

const complain = (error: unknown) => console.error('The promises could not be looked through.', error)

export default defineNitroPlugin((nitro) => {
  if (import.meta.prerender) return
  const task = cron.schedule('* * * * *', () => whenReady().then(lookRound).catch(complain), { noOverlap: true, timezone: 'UTC' })
  nitro.hooks.hook('close', async () => {
    await task.destroy()
    await useAsker().close()
  })
})
