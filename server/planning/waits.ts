import { airOf, roomAirs } from '~~/server/work/air'
import { benchesOf } from '~~/server/work/benches'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { materialsToCome } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { readShut } from '~~/server/planning/vapour'
import type { ShutRoom } from '~~/server/planning/vapour'
import type { Database } from '~~/server/utils/database'
import { airAt } from '#shared/air/room'
import { roomClock } from '#shared/drying/clock'
import type { RoomClock } from '#shared/drying/clock'
import { predictCoat } from '#shared/drying/predict'
import type { AirSpan } from '#shared/drying/ladder'
import type { PreparedMaterial } from '#shared/drying/material'
import { trackRoom } from '#shared/drying/tools'
import type { CoatCase, CoatPrediction, RoomAir } from '#shared/drying/types'
import { metAt, minutesFrom } from '#shared/drying/waits'
import type { MilestoneName, Risk } from '#shared/terms'

const minute = 60_000

/** A wait in whole minutes, or null when no end of it is in sight; `promised` false when only a touch test can end it. */
export interface Wait { minutes: number | null, promised: boolean, windows: [from: number, to: number | null][] }

/** A film as it would go on now: what it is, how it goes on, and the air it would stand in. */
export interface FilmToCome { key: string, material: PreparedMaterial, coat: CoatCase, spans: AirSpan[] }

/**
 * How long coats that are still to come will have to wait, as if each went on now in the room its piece stands in.
 * One prediction for each material, room, coat and ground, kept for the length of one plan.
 */
export class WaitsToCome {
  readonly #benches: ReturnType<typeof benchesOf>
  readonly #clocks = new Map<number | null, RoomClock>()
  readonly #kept = new Map<string, CoatPrediction>()
  readonly #films = new Map<string, FilmToCome | null>()
  readonly #clockOf: (roomId: number | null) => RoomClock
  readonly #airs: Map<number, RoomAir>
  /** Rooms that nobody enters till somebody opens them. */
  readonly shut: ReadonlyMap<number, ShutRoom>

  constructor(db: Database, facts: PlanFacts, readonly now: number) {
    this.#benches = benchesOf(db, facts.owner.id, dryingMaterials(db, facts.owner.id, materialsToCome(facts)))
    const airs = roomAirs(db, facts.owner, now)
    this.#airs = airs
    this.shut = readShut(db, facts.owner.id, now)
    this.#clockOf = roomId => roomClock((roomId === null ? undefined : airs.get(roomId)) ?? airOf(facts.owner), now, preparedMaterials.tools)
  }

  /** From the end of a coat of this step until the next may follow. */
  wait(step: PlanFacts['steps'][number], roomId: number | null, milestone: MilestoneName | null, risk: Risk, windowed: boolean): Wait {
    const prediction = this.#predict(step, roomId)
    if (!prediction) return { minutes: 0, promised: true, windows: [] }
    const { at, promised } = metAt(prediction.milestones, milestone, risk, this.now)
    const windows = windowed ? prediction.windows.flatMap(({ opensAt, shutsAt }): [number, number | null][] => (opensAt === null ? [] : [[minutesFrom(this.now, opensAt, Math.ceil), shutsAt === null ? null : minutesFrom(this.now, shutsAt, Math.floor)]])) : []
    return { minutes: at === null ? null : minutesFrom(this.now, at, Math.ceil), promised, windows }
  }

  /** The coldest that a room is foretold to become between now and an instant (ms UTC, looked at for a week at most), °C; null without a room. */
  coldest(roomId: number | null, untilAt: number): number | null {
    const air = roomId === null ? undefined : this.#airs.get(roomId)
    if (!air) return null
    const track = trackRoom(preparedMaterials.tools, air, this.now)
    const hours = Math.max(0, Math.min(7 * 24, Math.ceil((untilAt - this.now) / (60 * minute))))
    return Math.min(...Array.from({ length: hours + 1 }, (_, ahead) => airAt(track, this.now + ahead * 60 * minute).tempC))
  }

  /** The film that a coat of this step would leave were it put on now, by a material as this bench has it; null where nothing dries. */
  film(step: PlanFacts['steps'][number], roomId: number | null): FilmToCome | null {
    const key = `${step.materialVersionId} ${roomId} ${step.coatSize} ${step.ground}`
    const known = this.#films.get(key)
    if (known !== undefined) return known
    const film = this.#filmOf(key, step, roomId)
    this.#films.set(key, film)
    return film
  }

  #filmOf(key: string, step: PlanFacts['steps'][number], roomId: number | null): FilmToCome | null {
    const material = step.materialVersionId === null ? null : this.#benches.materialFor(step.materialVersionId, 0)
    if (!material) return null
    const clock = this.#clocks.get(roomId) ?? this.#clockOf(roomId)
    this.#clocks.set(roomId, clock)
    return { key, material, coat: { appliedAt: this.now, size: step.coatSize, ground: step.ground }, spans: [{ clock, fromAt: this.now, toAt: null }] }
  }

  #predict(step: PlanFacts['steps'][number], roomId: number | null): CoatPrediction | null {
    const film = this.film(step, roomId)
    if (!film) return null
    const kept = this.#kept.get(film.key) ?? predictCoat(film.material, film.coat, film.spans, { now: this.now })
    this.#kept.set(film.key, kept)
    return kept
  }
}
