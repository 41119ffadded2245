import { writeFileSync } from 'node:fs'
import { relative } from 'node:path'
import type { Reporter, TestModule } from 'vitest/node'

const sentence = (error: unknown) => String(error instanceof Error || (typeof error === 'object' && error && 'message' in error) ? error.message : error).split('\n')[0]

/** Writes how many tests passed, and the names of those that did not, to the file that STILLWET_TALLY names. */
export default class TallyReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], unhandled: readonly unknown[]) {
    const file = process.env.STILLWET_TALLY
    if (!file) return
    const failed = unhandled.map(error => `outside any test: ${sentence(error)}`)
    let passed = 0
    for (const module of modules) {
      const where = `${module.project.name}: ${relative(process.cwd(), module.moduleId)}`
      failed.push(...module.errors().map(error => `${where}: ${sentence(error)}`))
      for (const test of module.children.allTests()) {
        const { state } = test.result()
        // A test that was skipped or never ended proves nothing, so it does not pass.
        if (state === 'passed') passed += 1
        else failed.push(`${where} > ${test.fullName}${state === 'failed' ? '' : ` (${state})`}`)
      }
      for (const suite of module.children.allSuites()) failed.push(...suite.errors().map(error => `${where} > ${suite.fullName}: ${sentence(error)}`))
    }
    writeFileSync(file, JSON.stringify({ passed, failed }))
  }
}
