import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { expect, it } from 'vitest'

const root = fileURLToPath(new URL('../../..', import.meta.url))

it.each(['model', 'vapour'])('npm run %s ends with 2 and one line for a malformed case', (command) => {
  const { status, stdout, stderr } = spawnSync('npm', ['run', '--silent', command, '--', '-'], { cwd: root, input: '{"room": 7, "material": 7}', encoding: 'utf8' })
  expect(status).toBe(2)
  expect(stdout).toBe('')
  expect(stderr.trim().split('\n')).toHaveLength(1)
}, 60_000)
