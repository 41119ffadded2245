import { defineNitroPlugin } from 'nitropack/runtime'
import { ConfigError, useConfig } from '~~/server/utils/config'
import { closeDatabase, prepareDatabase, setDatabase } from '~~/server/utils/database'
import { withMigrations } from '~~/server/utils/migrations'
import { finishBoot } from '~~/server/utils/ready'

async function prepare() {
  const config = useConfig()
  setDatabase(await withMigrations(folder => prepareDatabase(config.databaseFile, folder, config.backupFolder, Date.now())))
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
