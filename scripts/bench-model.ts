import { performance } from 'node:perf_hooks'
import { dryingTools } from '#shared/drying/tools'
import type { DryingMaterial } from '#shared/drying/types'
import { findLibraryMaterial } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import { runCell } from './bench/model/cell'
import { learners, readied } from './bench/model/learners'
import { bandPicture, earlyPicture, nightPicture, writePictures } from './bench/model/pictures'
import { probe } from './bench/model/probes'
import { rungLines, summaryLines } from './bench/model/table'
import { worlds } from './bench/model/worlds'

const usage = `npm run bench:model [-- --benches N] [--learner NAME] [--seed N] [--worlds a,b] [--pictures FOLDER]

Measures how well a bench's own touch tests make its times right, in worlds whose truth is known. Prints every bar;
with --pictures it also draws what docs/model.md shows.
Learners: ${Object.keys(learners).join(', ')}. Default: 2,000 benches a cell, the last learner.`

/** Four materials, by four ways of hardening, that a thumb can follow to the end: rungs of weeks are left out, and so are limits, which are the refusals' part. */
function materialOf(id: string): DryingMaterial {
  const found = findLibraryMaterial(id)
  if (!found) throw new Error(`${id}: expected a starter material`)
  const whole = dryingMaterial(found)
  return { ...whole, minTempC: null, maxRh: null, windows: [], milestones: [...whole.milestones].sort((a, b) => a.typical - b.typical).filter(m => m.typical <= 3000) }
}

const names = ['decoupage-medium', 'alkyd-enamel', 'nitrocellulose-lacquer', 'epoxy-slow']

function optionOf(args: readonly string[], name: string, otherwise: string): string {
  const place = args.indexOf(name)
  return place < 0 ? otherwise : args[place + 1] ?? ''
}

function main(args: readonly string[]): number {
  if (args.includes('--help')) {
    console.log(usage)
    return 0
  }
  const benches = Number(optionOf(args, '--benches', '2000'))
  const seed = Number(optionOf(args, '--seed', '20260401'))
  const learner = learners[optionOf(args, '--learner', Object.keys(learners).at(-1)!)]
  if (!(benches >= 1) || !Number.isInteger(seed) || !learner) {
    console.error('--benches, --seed, --learner: expected a number, a whole number, and a learner that is there')
    return 2
  }
  const began = performance.now()
  const tools = dryingTools()
  const asked = optionOf(args, '--worlds', worlds.map(w => w.name).join(',')).split(',')
  const chosen = worlds.filter(w => asked.includes(w.name))
  const cells = chosen.flatMap((world, w) => names.map((name, m) => {
    const material = materialOf(name)
    return { world, material, name, rooms: runCell(world, material, learner, benches, seed + 1_000_003 * (w * names.length + m), tools) }
  }))
  console.log(`learner: ${learner.name} (${learner.says}); ${benches} benches a cell; seed ${seed}`)
  for (const { name, says } of chosen) console.log(`world ${name}: ${says}`)
  for (const line of summaryLines(cells, chosen)) console.log(line)
  for (const name of names) {
    const { inBand, late, disorder, nulls, leastSpan } = probe(materialOf(name), learner, tools)
    console.log(`  ${name.padEnd(24)} one test in band moves another rung ${(100 * inBand).toFixed(1)}% (bar 10)${inBand <= 0.1 ? '' : '!'}; 20 late ones move the speed ${(100 * late).toFixed(1)}% (bar 3)${late <= 0.03 ? '' : '!'}; far out: ${disorder} out of order, ${nulls} nulls without cause, give-till at least ${(100 * leastSpan).toFixed(0)}% further on`)
  }
  for (const line of rungLines(cells)) console.log(line)
  const folder = optionOf(args, '--pictures', '')
  if (folder !== '') writePictures(folder, { 'model-early.svg': earlyPicture(cells, chosen), 'model-bands.svg': bandPicture(readied(materialOf('alkyd-enamel'), tools), 3), 'model-night.svg': nightPicture() })
  console.log(`runtime ${((performance.now() - began) / 1000).toFixed(0)} s`)
  return 0
}

process.exitCode = main(process.argv.slice(2))
