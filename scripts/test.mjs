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

const tests = spawnSync(node, ['node_modules/vitest/vitest.mjs', 'run', ...process.argv.slice(2)], { stdio: 'inherit', env: { ...process.env, STILLWET_TALLY: tallyFile } })
try {
  const counted = JSON.parse(readFileSync(tallyFile, 'utf8'))
  tally.passed += counted.passed
  // A skipped test proves nothing, so it does not pass.
  tally.failed += counted.failed + counted.skipped
}
catch {
  tally.failed += 1
}
if (tests.status !== 0 && tally.failed === 0) tally.failed = 1
rmSync(folder, { recursive: true })

console.log(`${tally.passed} passed, ${tally.failed} failed`)
process.exit(tally.failed === 0 ? 0 : 1)
