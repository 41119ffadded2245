import { Refused, readSettings, runUpkeep } from './upkeep/settings'
import { putBack } from './upkeep/archive'

const usage = 'npm run --silent restore -- FOLDER: puts a backup in the place of database and storage. The server must be stopped; what stands there now is kept beside it.'

await runUpkeep(() => {
  const [folder, ...more] = process.argv.slice(2)
  if (folder === undefined || folder === '--help' || more.length > 0) throw new Refused(usage)
  return putBack(readSettings(), folder, Date.now())
})
