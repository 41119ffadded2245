import type { MilestonePrediction } from '#shared/drying/types'
import type { FilmState, GroupState, PartState, PieceState, RoomState, SessionState, TurnState } from '#shared/schemas/piece-state'
import { leavesFilm } from '#shared/step-kinds'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import type { Film, Grip, Moment, PartFacts } from '#shared/verdict/types'

/** What the verdict needs to know of the rooms and places besides the pieces; and when the plan begins the sessions that the pieces' work lies in, where it is known. */
export interface Whereabouts { rooms: readonly Pick<RoomState, 'id' | 'name' | 'keepOut'>[], places: readonly { id: number, name: string }[], sessions?: readonly Pick<SessionState, 'id' | 'startsAt'>[] }

/**
 * The facts the verdict is read from, one list for each group of parts that move together.
 * @param piece as `StudioState` carries it, instants in ms UTC
 */
export function pieceFacts(piece: PieceState, where: Whereabouts): PartFacts[][] {
  return piece.groups.map(group => groupFacts(piece, group, where))
}

/** The facts of one group of parts that move together. */
export function groupFacts(piece: PieceState, group: GroupState, where: Whereabouts): PartFacts[] {
  const room = where.rooms.find(each => each.id === group.roomId)
  const place = where.places.find(each => each.id === group.placeId)
  const turns = piece.turns.filter(turn => turn.partIds.some(id => group.parts.some(part => part.partId === id)))
  return group.parts.map((part): PartFacts => ({
    partId: part.partId,
    name: part.name,
    films: group.films.filter(film => film.partIds[0] === part.partId || (film.partIds.includes(part.partId) && !group.parts.some(each => each.partId === film.partIds[0]))).map(filmFacts),
    grip: gripOf(part, group),
    doing: doingOf(turns),
    due: dueOf(turns),
    place: room && place ? { room: room.name, place: place.name } : null,
    missing: part.missingAt === null ? null : { where: place?.name ?? '', seenAt: part.seenAt ?? part.missingAt },
    intake: piece.intake,
    keepOut: room?.keepOut ? { room: room.name } : null,
  }))
}

/** The carrier is always clean; a place on the part is only as clean as the films on that face. */
function gripOf(part: PartState, group: GroupState): Grip | null {
  if (group.carrier !== null) return { name: group.carrier, films: [] }
  const grip = part.grip
  if (grip === null) return null
  const onGrip = group.films.filter(film => film.kind !== 'glue-up' && film.partIds.includes(part.partId) && (film.faces.length === 0 || film.faces.includes(grip)))
  return { name: grip, films: onGrip.map(film => film.coatId) }
}

function doingOf(turns: readonly TurnState[]): PartFacts['doing'] {
  const doing = turns.find(turn => turn.doing !== null)
  return doing?.doing ? { by: doing.doing.by, what: doing.step.name, since: doing.doing.sinceAt } : null
}

/** The first planned coat or glue-up that nobody has spoken to since. */
function dueOf(turns: readonly TurnState[]): PartFacts['due'] {
  const due = turns.flatMap((turn) => {
    const wets = turn.kind === 'work' && leavesFilm(turn.step.kind)
    if (!wets || turn.status !== 'waiting' || turn.step.status === 'set aside' || !turn.plan) return []
    return turn.notOnAt !== null && turn.notOnAt >= turn.plan.dueAt ? [] : [{ at: turn.plan.dueAt, what: turn.step.name }]
  })
  return due.reduce<PartFacts['due']>((first, each) => (first === null || each.at < first.at ? each : first), null)
}

/** A film reduced to what hands need to know of it. */
export function filmFacts(film: FilmState): Film {
  const handle: MilestoneName = film.kind === 'glue-up' ? 'out-of-clamps' : film.kind === 'size' ? 'cured' : 'dry-to-handle'
  const doubt = film.doubts.find(each => each.cause === 'failed') ?? film.doubts[0] ?? null
  return {
    coatId: film.coatId, material: film.material, kind: film.kind, mustLieLevel: film.mustLieLevel, gloves: film.glovesUntil !== null, hold: film.hold, doubt,
    touch: exactly(film, 'set-to-touch'),
    handle: atLeast(film, handle),
    tackFree: exactly(film, 'tack-free'),
    hard: exactly(film, 'dry-to-sand-flat'),
    cured: exactly(film, 'cured'),
    strength: exactly(film, 'full-strength'),
  }
}

function exactly(film: FilmState, name: MilestoneName): Moment | null {
  return momentOf(film.milestones.find(each => each.name === name))
}

/** The rung, or the next one up where the ladder has not got it. */
function atLeast(film: FilmState, name: MilestoneName): Moment | null {
  const wanted = milestoneNames.indexOf(name)
  return exactly(film, name) ?? momentOf(film.milestones.find(each => milestoneNames.findIndex(one => one === each.name) >= wanted))
}

function momentOf(rung: MilestonePrediction | undefined): Moment | null {
  return rung ? { likelyAt: rung.likelyAt, p90At: rung.p90At, p98At: rung.p98At, reachedAt: rung.reachedAt, reason: rung.reason } : null
}
