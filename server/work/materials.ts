import { asc, inArray } from 'drizzle-orm'
import { materialFigure, materialVersion, milestone, mix, recoatWindow } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { prepareMaterial } from '#shared/drying/material'
import type { PreparedMaterial } from '#shared/drying/material'
import { dryingTools } from '#shared/drying/tools'
import type { DryingTools } from '#shared/drying/tools'
import type { DryingMaterial } from '#shared/drying/types'
import { hazes } from '#shared/library/types'

/** What the drying clock needs of some material editions, by edition. Minutes, degrees Celsius, shares 0..1. */
export function dryingMaterials(db: Database | Transaction, studioId: number, versionIds: readonly number[]): Map<number, DryingMaterial> {
  const ids = [...new Set(versionIds)]
  if (ids.length === 0) return new Map()
  const rungs = db.select().from(milestone).where(scoped(milestone, studioId, inArray(milestone.versionId, ids))).orderBy(asc(milestone.versionId), asc(milestone.ordinal)).all()
  const windows = db.select().from(recoatWindow).where(scoped(recoatWindow, studioId, inArray(recoatWindow.versionId, ids))).orderBy(asc(recoatWindow.ordinal)).all()
  const figures = db.select().from(materialFigure).where(scoped(materialFigure, studioId, inArray(materialFigure.versionId, ids))).all()
  const solvents = new Map(db.select({ id: materialVersion.id, solvent: materialVersion.solvent }).from(materialVersion).where(scoped(materialVersion, studioId, inArray(materialVersion.id, ids))).all().map(each => [each.id, each.solvent]))
  const mixed = new Set(db.select({ id: mix.versionId }).from(mix).where(scoped(mix, studioId, inArray(mix.versionId, ids))).all().map(each => each.id))
  return new Map(ids.map((id) => {
    const figure = (name: string) => figures.find(each => each.versionId === id && each.name === name)?.typical ?? null
    return [id, {
      reference: { tempC: figure('reference temperature') ?? 20, rh: figure('reference humidity') ?? 0.5 },
      minTempC: figure('minimum temperature'), maxRh: figure('humidity ceiling'), dryAirFloor: figure('dry-air floor'), thicknessExponent: figure('thickness exponent') ?? undefined,
      blushes: hazes(solvents.get(id) ?? ''),
      ...mixed.has(id) ? { mixed: true } : {},
      milestones: rungs.filter(each => each.versionId === id).map(({ name, driver, low, typical, high }) => ({ name, driver, low, typical, high })),
      windows: windows.filter(each => each.versionId === id).map(({ fromMin, toMin }) => [fromMin, toMin] as const),
    }]
  }))
}

/** Prepared editions, kept by what they say: an edition in use never changes, and equal figures give equal tables. */
export class PreparedMaterials {
  readonly #kept = new Map<string, PreparedMaterial>()

  constructor(readonly tools: DryingTools) {}

  prepare(material: DryingMaterial): PreparedMaterial {
    const key = JSON.stringify(material)
    const kept = this.#kept.get(key) ?? prepareMaterial(material, this.tools)
    this.#kept.set(key, kept)
    return kept
  }
}

/** Tables that depend on no reading, built once for the process: the warm start of every prediction. */
export const preparedMaterials = new PreparedMaterials(dryingTools())
