import { defineNitroPlugin } from 'nitropack/runtime'
import { releaseHolds } from '~~/server/reminders/claim'
import { openChannels } from '~~/server/reminders/channels'
import { tick } from '~~/server/reminders/tick'
import { reconcileAll } from '~~/server/reminders/wanted'
import { forgetPhotos } from '~~/server/services/photos'
import { change } from '~~/server/utils/change'
import { useConfig } from '~~/server/utils/config'
import { useDatabase } from '~~/server/utils/database'
import { whenReady } from '~~/server/utils/ready'
import { goRounds } from '~~/server/utils/rounds'

async function lookRound() {
  const db = useDatabase()
  const now = Date.now()
  reconcileAll(db, now)
  const studios = await tick(db, now, openChannels(db, useConfig()))
  await forgetPhotos(db, useConfig().storageFolder, now)
  // Open pages show the calls too.
  for (const studioId of studios) change(db, studioId, 'calls', () => undefined)
}

async function begin() {
  await whenReady()
  releaseHolds(useDatabase(), Date.now())
  await lookRound()
}

const complain = (error: unknown) => console.error('The calls could not be looked through.', error)

// Once a minute, and once at boot: what fell due while the server was down is not lost.
export default defineNitroPlugin((nitro) => {
  if (import.meta.prerender) return
  const boot = begin().catch(complain)
  const endRounds = goRounds('* * * * *', () => boot.then(lookRound).catch(complain))
  nitro.hooks.hook('close', async () => {
    await endRounds()
  })
})
