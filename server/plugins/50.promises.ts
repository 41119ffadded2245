import { defineNitroPlugin } from 'nitropack/runtime'
import { studio } from '~~/db/schema'
import { watchPromises } from '~~/server/planning/promise-watch'
import { tellingListener } from '~~/server/reminders/wanted'
import { useAsker } from '~~/server/utils/asker'
import { useDatabase } from '~~/server/utils/database'
import { whenReady } from '~~/server/utils/ready'
import { goRounds } from '~~/server/utils/rounds'

/** One studio after another: a promise that begins to slip is called at the next look at the calls. */
async function lookRound() {
  const db = useDatabase()
  for (const { id } of db.select({ id: studio.id }).from(studio).all()) {
    const now = Date.now()
    const looked = await watchPromises(db, id, now, {
      reckon: () => useAsker().ask(db, 'promises', { studioId: id }, now),
      saves: (orderId, batchId) => useAsker().ask(db, 'rescue', { studioId: id, orderId, batchId }, now),
    })
    if (looked > 0) tellingListener(db, id, Date.now())
  }
}

const complain = (error: unknown) => console.error('The promises could not be looked through.', error)

export default defineNitroPlugin((nitro) => {
  if (import.meta.prerender) return
  const endRounds = goRounds('* * * * *', () => whenReady().then(lookRound).catch(complain))
  nitro.hooks.hook('close', async () => {
    await endRounds()
    await useAsker().close()
  })
})
