import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import type { Row } from './row'

/** Most that a process held which only planned 500 pieces for two seconds, in MB; and one that read the same code and planned nothing. */
export function benchMemory(told: (row: Row) => void): void {
  const [whole, idle] = [held('500'), held('0')]
  told({ measure: 'memory of a process that plans 500 pieces x 12 for 2 s', bar: '300 MB', aim: '', measured: `${whole.toFixed(0)} MB (${idle.toFixed(0)} MB of it node, its loader and the code)`, met: whole < 300 })
}

function held(pieces: string): number {
  const child = spawnSync(process.execPath, ['--import', 'tsx', fileURLToPath(new URL('hold.ts', import.meta.url)), pieces], { encoding: 'utf8' })
  if (child.status !== 0) throw new Error(child.stderr)
  return Number(child.stdout)
}
