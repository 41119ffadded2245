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

let passed = 0
const failed = []
execFileSync(node, ['node_modules/nuxt/bin/nuxt.mjs', 'prepare'], { stdio: 'ignore' })
for (const [name, [command, ...args]] of checks) {
  const { status } = spawnSync(command, args, { stdio: 'inherit' })
  if (status === 0) passed += 1
  else failed.push(`check: ${name}`)
  console.log(`${name}: ${status === 0 ? 'passed' : 'failed'}`)
}

/** Runs some of the projects and adds up what they counted. A run that counted nothing has failed. */
function runTests(...projects) {
  rmSync(tallyFile, { force: true })
  const named = projects.flatMap(project => ['--project', project])
  const { status } = spawnSync(node, ['node_modules/vitest/vitest.mjs', 'run', ...named, ...process.argv.slice(2)], { stdio: 'inherit', env: { ...process.env, STILLWET_TALLY: tallyFile } })
  try {
    const counted = JSON.parse(readFileSync(tallyFile, 'utf8'))
    passed += counted.passed
    failed.push(...counted.failed)
    if (counted.failed.length === 0 && status !== 0) failed.push(`tests: the run of ${projects.join(', ')} ended with ${status}`)
  }
  catch {
    failed.push(`tests: the run of ${projects.join(', ')} was not counted`)
  }
}

// Apart: a page in a real browser has to answer within a second, which it cannot beside two busy unit runs.
runTests('unit', 'outside', 'nuxt')
runTests('api', 'browser')
rmSync(folder, { recursive: true })

// Last of all, because of a long log often only the end is kept.
if (failed.length > 0) console.log(['Failed:', ...failed.map(name => `  ${name}`), ''].join('\n'))
console.log(`${passed} passed, ${failed.length} failed`)
process.exit(failed.length === 0 ? 0 : 1)
