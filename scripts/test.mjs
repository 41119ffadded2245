// npm test: style, types, dead code and every test, then one closing line: N passed, N failed.
import { execFileSync, spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

const node = process.execPath
const folder = mkdtempSync(join(tmpdir(), 'stillwet-tally-'))
const tallyFile = join(folder, 'tally.json')

const checks = [
  ['style', [node, 'node_modules/eslint/bin/eslint.js', '.']],
  ['types', [node, 'node_modules/nuxt/bin/nuxt.mjs', 'typecheck']],
  ['types of the service worker', [node, 'node_modules/typescript/bin/tsc', '-p', 'service-worker']],
  ['dead code', [node, 'node_modules/knip/bin/knip.js']],
]

const tally = { passed: 0, failed: 0 }
execFileSync(node, ['node_modules/nuxt/bin/nuxt.mjs', 'prepare'], { stdio: 'ignore' })
for (const [name, [command, ...args]] of checks) {
  const { status } = spawnSync(command, args, { stdio: 'inherit' })
  tally[status === 0 ? 'passed' : 'failed'] += 1
  console.log(`${name}: ${status === 0 ? 'passed' : 'failed'}`)
}

/** Runs some of the projects and adds up what they counted. A run that counted nothing has failed. */
function runTests(...projects) {
  rmSync(tallyFile, { force: true })
  const named = projects.flatMap(project => ['--project', project])
  const { status } = spawnSync(node, ['node_modules/vitest/vitest.mjs', 'run', ...named, ...process.argv.slice(2)], { stdio: 'inherit', env: { ...process.env, STILLWET_TALLY: tallyFile } })
  let failed = 1
  try {
    const counted = JSON.parse(readFileSync(tallyFile, 'utf8'))
    tally.passed += counted.passed
    // A skipped test proves nothing, so it does not pass.
    failed = counted.failed + counted.skipped
  }
  catch {
    console.error('The tests were not counted.')
  }
  tally.failed += failed === 0 && status !== 0 ? 1 : failed
}

// Apart: the build that the served tests share takes the ground from under a page mounted by itself.
runTests('unit', 'outside', 'nuxt')
runTests('api', 'browser')
rmSync(folder, { recursive: true })

console.log(`${tally.passed} passed, ${tally.failed} failed`)
process.exit(tally.failed === 0 ? 0 : 1)
