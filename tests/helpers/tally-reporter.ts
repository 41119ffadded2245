import { writeFileSync } from 'node:fs'
import type { Reporter, TestModule } from 'vitest/node'

/** Writes how many tests passed, failed and were skipped to the file that STILLWET_TALLY names. */
export default class TallyReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], unhandled: readonly unknown[]) {
    const file = process.env.STILLWET_TALLY
    if (!file) return
    const count = { passed: 0, failed: unhandled.length, skipped: 0, pending: 0 }
    for (const module of modules) {
      for (const test of module.children.allTests()) count[test.result().state] += 1
      count.failed += module.errors().length
    }
    writeFileSync(file, JSON.stringify({ passed: count.passed, failed: count.failed + count.pending, skipped: count.skipped }))
  }
}
