import { inArray } from 'drizzle-orm'
import { benchSpeed } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { preparedMaterials } from '~~/server/work/materials'
import { lessonOf } from '#shared/drying/bench-tests'
import type { BenchTest } from '#shared/drying/learn'
import { learnBench } from '#shared/drying/learn'
import type { PreparedMaterial } from '#shared/drying/material'
import { withLearned } from '#shared/drying/material'
import type { DryingMaterial } from '#shared/drying/types'

/** A test on its rung's clock, with the rows it came from. */
export interface KeptTest extends BenchTest { testId: number, coatId: number }

/** What `bench_speed.state` holds: the tests as bounds, and what they were worked out from. Derived: `relearn` writes it, nothing else. */
export interface BenchState { signature: string, tests: KeptTest[] }

/** Reads a stored state; null for none, or one that an older version wrote otherwise. */
export function benchState(value: unknown): BenchState | null {
  return typeof value === 'object' && value !== null && 'signature' in value && 'tests' in value && Array.isArray(value.tests) ? { ...value as BenchState, tests: (value as BenchState).tests.map(test => ({ ...test, coat: test.coatId })) } : null
}

/** How many learned materials are kept ready in the process. */
const keptMost = 500
const kept = new Map<string, PreparedMaterial>()

/** The material as these tests have it, kept by edition and by what was learned. */
function learnedMaterial(key: string, sheet: PreparedMaterial, tests: readonly KeptTest[]): PreparedMaterial {
  const known = kept.get(key)
  if (known) return known
  const bench = learnBench(sheet.rungs.map(rung => rung.quantiles), tests)
  const learned = bench.kind === 'learned' ? withLearned(sheet, bench) : sheet
  if (kept.size >= keptMost) kept.clear()
  kept.set(key, learned)
  return learned
}

/** The materials of a studio as its bench has them, by edition. */
export function benchesOf(db: Database | Transaction, studioId: number, sheets: ReadonlyMap<number, DryingMaterial>) {
  const ids = [...sheets.keys()]
  const rows = ids.length === 0 ? [] : db.select().from(benchSpeed).where(scoped(benchSpeed, studioId, inArray(benchSpeed.materialVersionId, ids))).all()
  const states = new Map(rows.map(row => [row.materialVersionId, benchState(row.state)]))
  return {
    /** The material for one coat: its own "not yet" tests do not teach it, they bound it. Null for an edition that was not asked for. */
    materialFor(versionId: number, coatId: number): PreparedMaterial | null {
      const sheet = sheets.get(versionId)
      if (!sheet) return null
      const prepared = preparedMaterials.prepare(sheet)
      const state = states.get(versionId)
      if (!state || state.tests.length === 0) return prepared
      const key = `${studioId} ${versionId} ${state.signature}`
      const lesson = lessonOf(state.tests, coatId)
      return learnedMaterial(lesson.length < state.tests.length ? `${key} ${coatId}` : key, prepared, lesson)
    },
  }
}
