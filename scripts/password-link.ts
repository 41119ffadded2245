import { existsSync } from 'node:fs'
import { Refused, readSettings, runUpkeep } from './upkeep/settings'
import { askReset } from '~~/server/services/password-reset'
import { openDatabase } from '~~/server/utils/database'

const usage = 'npm run --silent password-link -- ADDRESS: prints a link to a new password for whoever signs in with this address. It opens for an hour, once.'

await runUpkeep(() => {
  const [address, ...more] = process.argv.slice(2)
  if (address === undefined || address === '--help' || more.length > 0) throw new Refused(usage)
  const config = readSettings()
  if (!existsSync(config.databaseFile)) throw new Refused(`There is no database at ${config.databaseFile}.`)
  const db = openDatabase(config.databaseFile)
  try {
    const asked = askReset(db, address.trim().toLowerCase(), Date.now())
    if (!asked) throw new Refused(`Nobody signs in with ${address} whose password can be chosen anew. The demo’s people keep theirs.`)
    return `${config.publicUrl ?? ''}/reset/${asked.token}`
  }
  finally {
    db.$client.close()
  }
})
