import { Refused, readSettings, runUpkeep } from './upkeep/settings'
import { makeArchive } from './upkeep/archive'

const usage = 'npm run --silent backup -- [FOLDER]: copies database and storage, also while the server runs, into a new folder there (the backup folder when not given) and prints its path.'

await runUpkeep(() => {
  const [folder, ...more] = process.argv.slice(2)
  if (folder === '--help' || more.length > 0) throw new Refused(usage)
  const config = readSettings()
  return makeArchive(config, folder ?? config.backupFolder, Date.now())
})
