import { cpus } from 'node:os'
import { benchAsking } from './bench/asking'
import { benchBoard } from './bench/board'
import { benchPlanner } from './bench/planner'
import { benchPredict } from './bench/predict'
import { benchPromise } from './bench/promise'
import { benchReadings } from './bench/readings'
import { benchStart } from './bench/start'
import { benchVapour } from './bench/vapour'

const benches: Record<string, () => string[] | Promise<string[]>> = { asking: benchAsking, board: benchBoard, planner: benchPlanner, predict: benchPredict, promise: benchPromise, readings: benchReadings, start: benchStart, vapour: benchVapour }

const usage = `npm run bench [-- NAME ...]

Measures the working parts and prints what was measured, with its seed and its machine.
Names: ${Object.keys(benches).join(', ')}; all of them without a name.`

async function main(names: readonly string[]): Promise<number> {
  if (names.includes('--help') || names.includes('-h')) {
    console.log(usage)
    return 0
  }
  const unknown = names.find(name => !(name in benches))
  if (unknown !== undefined) {
    console.error(`NAME: expected one of ${Object.keys(benches).join(', ')}, got "${unknown}"`)
    return 2
  }
  console.log(`machine: ${cpus()[0]?.model ?? 'unknown'} x ${cpus().length}, node ${process.version}`)
  for (const [name, bench] of Object.entries(benches)) {
    if (names.length > 0 && !names.includes(name)) continue
    for (const line of await bench()) console.log(line)
  }
  return 0
}

process.exitCode = await main(process.argv.slice(2))
