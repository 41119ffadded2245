import { defineNitroPlugin } from 'nitropack/runtime'
import { studio } from '~~/db/schema'
import { replan } from '~~/server/planning/replan'
import { change } from '~~/server/utils/change'
import { onChange } from '~~/server/utils/bus'
import type { ChangeKind } from '~~/server/utils/bus'
import { useDatabase } from '~~/server/utils/database'
import { usePlanRunner } from '~~/server/utils/planRunner'
import { whenReady } from '~~/server/utils/ready'
import { goRounds } from '~~/server/utils/rounds'
import { predictPieces } from '~~/server/work/predict'

/** Changes that move a plan. A plan of its own and the calls that follow it do not. */
const moving: ReadonlySet<ChangeKind> = new Set(['work', 'air', 'places', 'hours', 'people', 'settings'])

/** Several taps in a row make one plan. */
const settleMs = 250

const waiting = new Map<number, ReturnType<typeof setTimeout>>()

function planSoon(studioId: number) {
  clearTimeout(waiting.get(studioId))
  waiting.set(studioId, setTimeout(() => {
    waiting.delete(studioId)
    void planNow(studioId)
  }, settleMs))
}

async function planNow(studioId: number) {
  try {
    const done = await replan(useDatabase(), studioId, Date.now())
    if (done.ok || done.reason === 'superseded' || done.reason === 'no studio') return
    // Something else was committed while it was being planned: plan what stands now. To do so for a superseded one would
    // end the newer search that superseded it, and so on for ever.
    if (done.reason === 'stale') planSoon(studioId)
    else console.error(`The plan of studio ${studioId} was not made. ${done.message}`)
  }
  catch (error) {
    console.error(`The plan of studio ${studioId} was not made.`, error)
  }
}

/** Time alone moves things too: a night passes a glue's minimum, a planned start goes by, a window shuts. */
function lookRound() {
  const db = useDatabase()
  for (const { id } of db.select({ id: studio.id }).from(studio).all()) {
    change(db, id, 'prediction', tx => predictPieces(tx, id, null, Date.now()))
    planSoon(id)
  }
}

export default defineNitroPlugin((nitro) => {
  if (import.meta.prerender) return
  const stopListening = onChange(({ studioId, kind }) => moving.has(kind) && planSoon(studioId))
  const boot = whenReady().then(lookRound).catch((error: unknown) => console.error('The studios could not be planned.', error))
  const endRounds = goRounds('*/5 * * * *', () => boot.then(lookRound))
  nitro.hooks.hook('close', async () => {
    stopListening()
    for (const timer of waiting.values()) clearTimeout(timer)
    await endRounds()
    await usePlanRunner().close()
  })
})
