import { roomClock } from '#shared/drying/clock'
import type { PreparedMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import type { DryingTools } from '#shared/drying/tools'
import type { Air, CoatPrediction, DryingMaterial, RoomAir } from '#shared/drying/types'
import { minutesFrom, reachedAt, rungFor } from '#shared/drying/waits'
import type { DraftStep } from '#shared/schemas/schedule-draft'
import type { ScheduleLinkWire, WaitWire } from '#shared/schemas/schedule'
import type { MilestoneName, Risk } from '#shared/terms'

/** What of a step its film depends on. */
export type FilmStep = Pick<DraftStep, 'materialId' | 'coatSize' | 'ground'>

/** The air where nobody has said anything: the studio's usual climate, day and night, by its own clock. */
export const usualAir = (zone: string, usual: Air): RoomAir => ({ readings: [], heated: true, nightDropC: 0, zone, usual })

interface Made {
  /** The sheet of a material by its number. */
  sheets: ReadonlyMap<number, DryingMaterial>
  air: RoomAir
  /** When the coats are thought to go on, ms UTC. */
  now: number
  tools: DryingTools
  prepare: (sheet: DryingMaterial) => PreparedMaterial
}

/** How long a film of each kind waits in the studio's usual air. One prediction for each material, coat and ground, kept for as long as this is. */
export class UsualFilms {
  readonly #clock: ReturnType<typeof roomClock>
  readonly #kept = new Map<string, CoatPrediction>()

  constructor(readonly made: Made) {
    this.#clock = roomClock(made.air, made.now, made.tools)
  }

  #predict({ materialId, coatSize, ground }: FilmStep): CoatPrediction | null {
    const sheet = materialId === null ? undefined : this.made.sheets.get(materialId)
    if (!sheet || sheet.milestones.length === 0) return null
    const { now, prepare } = this.made
    const key = `${materialId} ${coatSize} ${ground}`
    const kept = this.#kept.get(key) ?? predictCoat(prepare(sheet), { appliedAt: now, size: coatSize, ground }, [{ clock: this.#clock, fromAt: now, toAt: null }], { now })
    this.#kept.set(key, kept)
    return kept
  }

  /** Null where the step leaves no film of a known material: then nothing is waited for. */
  wait(step: FilmStep, milestone: MilestoneName, risk: Risk): WaitWire | null {
    const prediction = this.#predict(step)
    const rung = prediction && rungFor(prediction.milestones, milestone)
    if (!rung) return null
    const { now } = this.made
    const cautious = reachedAt(rung, risk === 'p98' ? 'p98' : 'p90', now)
    const minutes = (at: number | null) => (at === null ? null : minutesFrom(now, at, Math.ceil))
    return { likelyMin: minutes(rung.likelyAt), giveTillMin: minutes(cautious.at), promised: cautious.promised }
  }

  /** Windows in minutes from the end of the work; one that never opens is left out. */
  windows(step: FilmStep): ScheduleLinkWire['windows'] {
    const { now } = this.made
    return (this.#predict(step)?.windows ?? []).flatMap(({ opensAt, shutsAt }) => (opensAt === null ? [] : [{ opensMin: minutesFrom(now, opensAt, Math.ceil), shutsMin: shutsAt === null ? null : minutesFrom(now, shutsAt, Math.floor) }]))
  }
}
