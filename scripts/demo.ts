import { addDemo, removeDemo } from './upkeep/demo'
import { Refused, readSettings, runUpkeep } from './upkeep/settings'

const usage = 'npm run --silent demo -- add|remove: adds the demo studio beside yours, or removes it whole with its people. The server must be stopped.'

await runUpkeep(() => {
  const [what, ...more] = process.argv.slice(2)
  if (more.length > 0 || (what !== 'add' && what !== 'remove')) throw new Refused(usage)
  return what === 'add' ? addDemo(readSettings(), Date.now()) : removeDemo(readSettings(), Date.now())
})
