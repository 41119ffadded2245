import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { readCase } from '../../../scripts/model/read-case'
import { runCase } from '../../../scripts/model/run-case'
import { minuteMs, tools } from '../../helpers/drying'

interface Expected {
  milestones: { name: string, likely: string | null, giveTill: string | null, reason: string | null }[]
  windows: { opens: string | null, shuts: string | null }[]
}

const { provenance, examples } = JSON.parse(readFileSync(new URL('../../fixtures/model-examples.json', import.meta.url), 'utf8')) as
  { provenance: string, examples: { case: { appliedAt: string }, expected: Expected }[] }

const close = (got: string | null, wanted: string | null, appliedAt: string) => {
  if (wanted === null) return expect(got).toBeNull()
  const elapsed = Date.parse(wanted) - Date.parse(appliedAt)
  expect(Math.abs(Date.parse(got ?? '') - Date.parse(wanted))).toBeLessThan(0.015 * elapsed + 2 * minuteMs)
}

describe(provenance, () => {
  it.each(examples.map((example, i) => [i, example] as const))('example %i within 1.5 % of the elapsed time and 2 min', (_, { case: given, expected }) => {
    const got = runCase(readCase(given, ''), tools)
    expect(got.milestones.map(m => [m.name, m.reason])).toEqual(expected.milestones.map(m => [m.name, m.reason]))
    for (const [i, m] of expected.milestones.entries()) {
      close(got.milestones[i]!.likely, m.likely, given.appliedAt)
      close(got.milestones[i]!.giveTill, m.giveTill, given.appliedAt)
    }
    for (const [i, w] of expected.windows.entries()) {
      close(got.windows[i]!.opens, w.opens, given.appliedAt)
      close(got.windows[i]!.shuts, w.shuts, given.appliedAt)
    }
  })
})
