import { defineNitroPlugin } from 'nitropack/runtime'
import { prepareDemo } from '~~/server/services/demo'
import { ConfigError, useConfig } from '~~/server/utils/config'
import { closeDatabase, prepareDatabase, setDatabase } from '~~/server/utils/database'
import { withMigrations } from '~~/server/utils/migrations'
import { finishBoot } from '~~/server/utils/ready'
import { demoWords } from '#shared/words/demo'

async function prepare() {
  const config = useConfig()
  const db = await withMigrations(folder => prepareDatabase(config.databaseFile, folder, config.backupFolder, Date.now()))
  const signIns = await prepareDemo(db, config, Date.now())
  setDatabase(db)
  if (signIns.length > 0) console.info(demoWords(signIns))
}

// Nitro does not wait for its plugins: requests wait on `ready`, and a failure ends the process in one sentence.
export default defineNitroPlugin((nitro) => {
  const ready = finishBoot(prepare()).catch((error: unknown) => {
    console.error(`Stillwet cannot start. ${error instanceof Error ? error.message : String(error)}`)
    process.exit(error instanceof ConfigError ? 2 : 1)
  })
  nitro.hooks.hook('request', () => ready)
  nitro.hooks.hook('close', closeDatabase)
})
