import type { MilestonePrediction } from '#shared/drying/types'
import type { LayerLine, PieceDetail } from '#shared/schemas/piece-detail'
import type { FilmState, GroupState, TurnState } from '#shared/schemas/piece-state'
import type { PieceStrip } from '#shared/strip'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import { milestoneText, stepLabel } from '#shared/words/steps'

const minute = 60_000
const day = 24 * 60 * minute
/** What lies further off says nothing on a strip: the list beneath has it. */
const mostAhead = 12 * day
const mostBehind = 4 * day
/** Rungs for good and all: they would fold everything before them into the strip's edge. */
const lastRungs: readonly string[] = ['full-strength', 'cured']

/** A face, or faces that were always coated together, or a glue line, with all that lies on it. */
export interface Surface {
  key: string
  partIds: number[]
  faces: string[]
  /** The top one first; settled ones have no film. */
  layers: { line: LayerLine, film: FilmState | null }[]
}

const surfaceKey = ({ partIds, faces }: { partIds: readonly number[], faces: readonly string[] }) => `${[...partIds].sort((a, b) => a - b).join(' ')}|${[...new Set(faces)].sort().join(' ')}`

/** A film that this page knows of before the piece's own lines do. */
const lineOf = (film: FilmState): LayerLine => ({ coatId: film.coatId, what: film.step || (film.material ?? ''), material: film.material, endedAt: film.endedAt, partIds: film.partIds, faces: [...new Set(film.faces)], layer: film.layer, settled: false })

/** The surfaces of a group of parts that have a film or ever had one; those still drying first. */
export function surfacesOf(group: GroupState, lines: readonly LayerLine[]): Surface[] {
  const partIds = new Set(group.parts.map(part => part.partId))
  const known = lines.filter(line => line.partIds.some(id => partIds.has(id)) && (line.settled || group.films.some(film => film.coatId === line.coatId)))
  const fresh = group.films.filter(film => !lines.some(line => line.coatId === film.coatId)).map(lineOf)
  const surfaces = new Map<string, Surface>()
  for (const line of [...fresh, ...known].sort((a, b) => b.layer - a.layer || b.endedAt - a.endedAt)) {
    const key = surfaceKey(line)
    const surface = surfaces.get(key) ?? { key, partIds: line.partIds, faces: line.faces, layers: [] }
    surface.layers.push({ line, film: group.films.find(film => film.coatId === line.coatId) ?? null })
    surfaces.set(key, surface)
  }
  const wet = (surface: Surface) => Number(surface.layers.some(layer => layer.film !== null))
  return [...surfaces.values()].sort((a, b) => wet(b) - wet(a))
}

/** What a surface is called: the part, and its faces where it has any; parts alone for a glue line. */
export function surfaceName(surface: Surface, group: GroupState, faceNames: PieceDetail['faceNames'], alone: boolean): string {
  const parts = group.parts.filter(part => surface.partIds.includes(part.partId)).map(part => part.name)
  const faces = surface.faces.map(key => faceNames[key] ?? key)
  const where = alone && faces.length > 0 ? [] : parts
  return [...where.length > 0 ? [where.join(' + ')] : [], ...faces.length > 0 ? [faces.join(', ')] : []].join(': ')
}

const indexOf = (name: string) => milestoneNames.findIndex(each => each === name)

/** The rung that turns gloss to chalk: dry to handle, or out of what holds it; else the next one up its ladder. */
export function chalkRung(film: FilmState): MilestonePrediction | null {
  const wanted: MilestoneName = film.kind === 'glue-up' ? 'out-of-clamps' : 'dry-to-handle'
  return film.milestones.find(each => each.name === wanted) ?? film.milestones.find(each => indexOf(each.name) >= indexOf(wanted)) ?? film.milestones.at(-1) ?? null
}

/**
 * The drying strip of a surface: every film on it that still matters, one drying over the other, with the rungs and
 * windows of the top one and what is planned on its parts. Null where nothing on it is drying.
 * @param now ms UTC
 * @param zone IANA name
 */
export function surfaceStrip(surface: Surface, turns: readonly TurnState[], now: number, zone: string): PieceStrip | null {
  const films = surface.layers.flatMap(layer => layer.film ?? [])
  const [top] = films
  if (!top) return null
  const mine = turns.filter(turn => turn.partIds.some(id => surface.partIds.includes(id)))
  const milestones = top.milestones.flatMap((rung) => {
    const likelyAt = rung.reachedAt ?? rung.likelyAt
    const name = milestoneNames[indexOf(rung.name)]
    if (likelyAt === null || name === undefined || (lastRungs.includes(rung.name) && top.milestones.length > 1) || likelyAt > now + mostAhead) return []
    return [{ label: milestoneText(name), likelyAt, giveTillAt: rung.reachedAt ?? rung.p90At }]
  })
  const windows = mine.some(turn => turn.waits.some(wait => wait.windowed)) ? top.windows.filter(each => (each.opensAt ?? 0) < now + mostAhead) : []
  const planned = mine.flatMap(turn => (turn.plan && turn.plan.startsAt > now && turn.plan.startsAt < now + mostAhead ? [{ at: turn.plan.startsAt, label: stepLabel(turn.step.kind, turn.name || turn.step.name) }] : []))
  const ends = [now + 45 * minute, ...milestones.map(each => Math.min(each.giveTillAt ?? each.likelyAt, now + mostAhead)), ...windows.flatMap(each => (each.shutsAt === null ? [] : [Math.min(each.shutsAt, now + mostAhead) + 30 * minute])), ...planned.map(each => each.at + 45 * minute)]
  const fromAt = Math.max(films.reduce((first, film) => Math.min(first, film.beganAt), top.beganAt), now - mostBehind)
  const coats = films.map((film) => {
    const rung = chalkRung(film)
    return { onAt: film.beganAt, likelyAt: rung?.reachedAt ?? rung?.likelyAt ?? null, giveTillAt: rung?.reachedAt ?? rung?.p90At ?? null }
  })
  return { fromAt, toAt: Math.max(fromAt + 30 * minute, ...ends) + 15 * minute, nowAt: now, zone, coats, milestones, windows, planned }
}
