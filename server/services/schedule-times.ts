import { and, asc, desc, eq, inArray, isNull } from 'drizzle-orm'
import { finishingSchedule, material, materialVersion, scheduleVersion } from '~~/db/schema'
import type { studio } from '~~/db/schema'
import { cautionsOf } from '~~/server/services/cautions'
import { minutesFrom, reachedAt, rungFor } from '~~/server/planning/waits'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { airOf } from '~~/server/work/air'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { readEdition } from '~~/server/work/schedule'
import type { ScheduleEdition } from '~~/server/work/schedule'
import { roomClock } from '#shared/drying/clock'
import { predictCoat } from '#shared/drying/predict'
import type { CoatPrediction } from '#shared/drying/types'
import { walkSchedule } from '#shared/schedule-walk'
import type { ScheduleDetailWire, ScheduleLinkWire, ScheduleStepWire, ScheduleWire, WaitWire } from '#shared/schemas/schedule'
import type { MilestoneName, Risk } from '#shared/terms'

type StudioRow = typeof studio.$inferSelect
type StepRow = ScheduleEdition['steps'][number]

/** The finishing schedules one can start from, with how long each takes in the studio's usual air. By name. */
export function listSchedules(db: Database, owner: StudioRow, now: number): ScheduleWire[] {
  return readSchedules(db, owner, now).map(({ steps: _steps, links: _links, ...schedule }) => schedule)
}

/** One of them with its steps, what each waits for and how long. */
export function findSchedule(db: Database, owner: StudioRow, id: number, now: number): ScheduleDetailWire | Refusal {
  return readSchedules(db, owner, now, id)[0] ?? absent()
}

function readSchedules(db: Database, owner: StudioRow, now: number, only?: number): ScheduleDetailWire[] {
  const rows = db.select({ schedule: finishingSchedule, version: scheduleVersion }).from(finishingSchedule).innerJoin(scheduleVersion, eq(scheduleVersion.scheduleId, finishingSchedule.id))
    .where(and(scoped(finishingSchedule, owner.id, isNull(finishingSchedule.archivedAt)), only === undefined ? undefined : eq(finishingSchedule.id, only)))
    .orderBy(asc(finishingSchedule.name), desc(scheduleVersion.no)).all()
  const newest = rows.filter((row, index) => rows.findIndex(each => each.schedule.id === row.schedule.id) === index)
  const editions = newest.map(row => ({ ...row, edition: readEdition(db, owner.id, row.version.id) }))
  const materials = readMaterials(db, owner.id, editions.flatMap(each => each.edition.steps.flatMap(step => step.materialId ?? [])))
  const times = new UsualTimes(db, owner, materials, now)
  return editions.map(({ schedule, version, edition }) => wireOf({ id: schedule.id, libraryKey: schedule.libraryKey, name: schedule.name, summary: version.summary, no: version.no }, edition, materials, times))
}

type Materials = Map<number, { id: number, name: string, versionId: number, solvent: string, cautions: string[] }>

/** The newest edition of each material. */
function readMaterials(db: Database, studioId: number, ids: readonly number[]): Materials {
  if (ids.length === 0) return new Map()
  const rows = db.select({ id: material.id, name: material.name, versionId: materialVersion.id, solvent: materialVersion.solvent, cautions: materialVersion.cautions }).from(material)
    .innerJoin(materialVersion, eq(materialVersion.materialId, material.id)).where(scoped(material, studioId, inArray(material.id, [...new Set(ids)]))).orderBy(asc(materialVersion.no)).all()
  return new Map(rows.map(row => [row.id, row]))
}

/** How long a coat of each kind waits where nobody has read the air: as if it went on now in the usual climate. */
class UsualTimes {
  readonly #sheets: ReturnType<typeof dryingMaterials>
  readonly #clock: ReturnType<typeof roomClock>
  readonly #kept = new Map<string, CoatPrediction>()

  constructor(db: Database, owner: StudioRow, readonly materials: Materials, readonly now: number) {
    this.#sheets = dryingMaterials(db, owner.id, [...materials.values()].map(each => each.versionId))
    this.#clock = roomClock(airOf(owner), now, preparedMaterials.tools)
  }

  #predict(step: StepRow): CoatPrediction | null {
    const versionId = step.materialId === null ? undefined : this.materials.get(step.materialId)?.versionId
    const sheet = versionId === undefined ? undefined : this.#sheets.get(versionId)
    if (!sheet) return null
    const key = `${versionId} ${step.coatSize} ${step.ground}`
    const kept = this.#kept.get(key) ?? predictCoat(preparedMaterials.prepare(sheet), { appliedAt: this.now, size: step.coatSize, ground: step.ground }, [{ clock: this.#clock, fromAt: this.now, toAt: null }], { now: this.now })
    this.#kept.set(key, kept)
    return kept
  }

  /** Null where the step leaves no film of a known material: then nothing is waited for. */
  wait(step: StepRow, milestone: MilestoneName, risk: Risk): WaitWire | null {
    const prediction = this.#predict(step)
    const rung = prediction && rungFor(prediction.milestones, milestone)
    if (!rung) return null
    const cautious = reachedAt(rung, risk === 'p98' ? 'p98' : 'p90', this.now)
    const minutes = (at: number | null) => (at === null ? null : minutesFrom(this.now, at, Math.ceil))
    return { likelyMin: minutes(rung.likelyAt), giveTillMin: minutes(cautious.at), promised: cautious.promised }
  }

  windows(step: StepRow): ScheduleLinkWire['windows'] {
    return (this.#predict(step)?.windows ?? []).flatMap(({ opensAt, shutsAt }) => (opensAt === null ? [] : [{ opensMin: minutesFrom(this.now, opensAt, Math.ceil), shutsMin: shutsAt === null ? null : minutesFrom(this.now, shutsAt, Math.floor) }]))
  }
}

type Head = Pick<ScheduleWire, 'id' | 'libraryKey' | 'name' | 'summary' | 'no'>

function wireOf(head: Head, edition: ScheduleEdition, materials: Materials, times: UsualTimes): ScheduleDetailWire {
  const steps = edition.steps.map(step => stepWire(step, edition, materials, times))
  const links = edition.links.map(link => linkWire(link, edition, times))
  const used = edition.steps.flatMap(step => (step.materialId === null ? [] : materials.get(step.materialId) ?? []))
  return {
    ...head, stepCount: steps.length, steps, links, ...handsOn(steps), elapsed: elapsedOf(steps, links),
    parts: edition.parts.map(part => ({ key: part.key, name: part.name, grip: part.grip, faces: part.faces.map(face => ({ key: face.key, name: face.name })) })),
    solventBorne: used.some(each => !['water', 'none'].includes(each.solvent)), cautions: cautionsOf(used),
  }
}

function stepWire(step: StepRow, edition: ScheduleEdition, materials: Materials, times: UsualTimes): ScheduleStepWire {
  const { key, name, kind, hold, dust, perDay, days, untilEnough, setupMin, pieceMin, cleanMin, releaseMin, hands } = step
  const its = step.materialId === null ? undefined : materials.get(step.materialId)
  const film = kind === 'coat' || kind === 'glue-up'
  const on = targetsOf(step, edition)
  return {
    key, name, kind, hold, dust, perDay, days, untilEnough, setupMin, pieceMin, cleanMin, releaseMin, hands,
    material: its ? { id: its.id, name: its.name } : null,
    parts: on.map(each => each.part), on,
    checks: step.checks.map(check => ({ name: check.name, afterMin: check.afterMin, minutes: check.minutes })),
    again: film && perDay * days > 1 ? times.wait(step, 'ready-to-recoat', 'p90') : null,
    held: film && hold !== null ? times.wait(step, 'out-of-clamps', 'p90') : null,
    dry: film && hold === null ? times.wait(step, 'dry-to-handle', 'p90') : null,
  }
}

/** What a step works on by name, in the order of the parts. */
function targetsOf(step: StepRow, edition: ScheduleEdition): ScheduleStepWire['on'] {
  return edition.parts.flatMap((part) => {
    const own = step.targets.filter(target => target.partKey === part.key)
    return own.length === 0 ? [] : [{ part: part.name, faces: part.faces.filter(face => own.some(target => target.faceKey === face.key)).map(face => face.name) }]
  })
}

function linkWire(link: ScheduleEdition['links'][number], edition: ScheduleEdition, times: UsualTimes): ScheduleLinkWire {
  const before = edition.steps.find(step => step.key === link.from)
  const wait = before && link.milestone !== null ? times.wait(before, link.milestone, link.risk) : null
  return { ...link, wait, windows: before && link.windowed ? times.windows(before) : [] }
}

/** Attended minutes: what a batch costs once, and what each piece adds. Every coat of a round is set up anew. */
function handsOn(steps: readonly ScheduleStepWire[]): { setupMin: number, pieceMin: number } {
  let setupMin = 0
  let pieceMin = 0
  for (const step of steps) {
    const turns = step.perDay * step.days
    setupMin += turns * (step.setupMin + step.cleanMin)
    pieceMin += turns * step.pieceMin + step.releaseMin + step.checks.reduce((sum, check) => sum + check.minutes, 0)
  }
  return { setupMin, pieceMin }
}

/** One piece from its first work to its last film dry to handle, around the clock. All waits late together: that is how damp weeks go. */
function elapsedOf(steps: readonly ScheduleStepWire[], links: readonly ScheduleLinkWire[]): WaitWire {
  const end = (by: 'likelyMin' | 'giveTillMin') => walkSchedule({ steps, links }, { by, pieces: 1, start: 0, opens: minute => minute }).end
  const waits = [...links.map(link => link.wait), ...steps.flatMap(step => [step.again, step.held, step.dry])]
  return { likelyMin: end('likelyMin'), giveTillMin: end('giveTillMin'), promised: waits.every(wait => wait === null || wait.promised) }
}
