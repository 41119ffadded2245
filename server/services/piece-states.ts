import { memberNames } from '~~/server/services/member-names'
import { readPieceRows } from '~~/server/services/piece-rows'
import type { PieceRows } from '~~/server/services/piece-rows'
import type { Database, Transaction } from '~~/server/utils/database'
import { grouped } from '#shared/grouped'
import { stepCautions } from '#shared/library/brief-cautions'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import type { FilmState, GroupState, PieceState, TurnState, WaitState } from '#shared/schemas/piece-state'

type Reader = Database | Transaction
type PartRow = PieceRows['parts'][number]
type FilmRow = PieceRows['films'][number]
type MaterialRow = NonNullable<ReturnType<PieceRows['materials']['get']>>
type StepRow = PieceRows['steps']['steps'][number]
type TurnRow = PieceRows['steps']['turns'][number]

/**
 * How pieces stand: where, with which films and their times, and what can be done next. The one source of every
 * screen, feed and message; the verdict is computed from it by `shared/verdict`, here and in the browser alike.
 * @param pieceIds only these; null means every piece in the studio
 */
export function pieceStates(db: Reader, studioId: number, pieceIds: readonly number[] | null): PieceState[] {
  const rows = readPieceRows(db, studioId, pieceIds)
  const films = filmStates(rows)
  const filmsOf = grouped(films, film => film.pieceId)
  const partsOf = grouped(rows.parts, row => row.pieceId)
  const turns = turnStates(rows, films, memberNames(db, studioId))
  const turnsOf = grouped(turns, row => row.pieceId)
  const intakeOf = new Map(rows.intakes.map(row => [row.pieceId, row.question]))
  return rows.pieces.map(row => ({
    id: row.id, name: row.name, version: row.version, batch: { id: row.batchId, name: row.batchName },
    order: row.orderId === null || row.orderName === null ? null : { id: row.orderId, name: row.orderName, dueAt: row.dueAt, promisedAt: row.promisedAt },
    groups: groupsOf(partsOf.get(row.id) ?? [], (filmsOf.get(row.id) ?? []).map(film => film.state)),
    turns: (turnsOf.get(row.id) ?? []).map(turn => turn.state),
    stepsDone: row.stepsDone, stepsOf: row.stepsOf,
    intake: intakeOf.get(row.id) ?? null,
  }))
}

interface PieceFilm { pieceId: number, stepId: number | null, state: FilmState }

const isSolventBorne = (material: MaterialRow | undefined) => material !== undefined && !['water', 'none'].includes(material.solvent)

function filmStates({ films, materials }: PieceRows): PieceFilm[] {
  return films.map((row) => {
    const material = materials.get(row.versionId ?? 0)
    return { pieceId: row.pieceId, stepId: row.stepId, state: filmState(row, material) }
  })
}

function filmState(row: FilmRow, material: MaterialRow | undefined): FilmState {
  return {
    coatId: row.id, actId: row.actId, kind: material?.kind === 'size' ? 'size' : row.kind, step: row.step, material: material?.name ?? null, materialVersionId: row.versionId,
    solventBorne: isSolventBorne(material), mustLieLevel: material?.mustLieLevel === 1, glovesUntil: material?.glovesUntil ?? null,
    partIds: [...new Set(row.targets.map(([partId]) => partId))], faces: row.targets.flatMap(([, face]) => face ?? []), layer: row.targets.reduce((top, [, , layer]) => Math.max(top, layer), 1),
    beganAt: row.beganAt, endedAt: row.endedAt, hold: row.outAt === null ? row.hold : null,
    milestones: row.rungs.map(([, name, likelyAt, p90At, p98At, reachedAt, reason]) => ({ name, likelyAt, p90At, p98At, reachedAt, reason })),
    windows: row.windows.map(([, opensAt, shutsAt]) => ({ opensAt, shutsAt })),
    doubts: row.doubts.map(([cause, fromAt]) => ({ cause, fromAt })),
  }
}

/** Parts joined to one another, directly or through a third, stand and are judged as one. */
function groupsOf(parts: readonly PartRow[], films: readonly FilmState[]): GroupState[] {
  const mainOf = (row: PartRow): number => {
    let now = row
    for (let depth = 0; now.into !== null && depth < parts.length; depth++) now = parts.find(each => each.id === now.into) ?? { ...now, into: null }
    return now.id
  }
  return [...grouped(parts, mainOf)].map(([mainId, together]): GroupState => {
    const main = together.find(row => row.id === mainId) ?? together[0]
    const ids = new Set(together.map(row => row.id))
    return {
      parts: together.map(row => ({ partId: row.id, key: row.key, name: row.name, grip: row.grip, missingAt: row.missingAt, seenAt: row.seenAt })),
      placeId: main?.placeId ?? null, roomId: main?.roomId ?? null, carrier: main?.carrier ?? null,
      films: films.filter(film => film.partIds.some(id => ids.has(id))),
    }
  })
}

interface PieceTurn { pieceId: number, state: TurnState }

function turnStates(rows: PieceRows, films: readonly PieceFilm[], names: ReadonlyMap<number, string>): PieceTurn[] {
  const { steps, turns, targets, sizes, links, entries } = rows.steps
  const sizeOf = new Map(sizes.map(row => [row.sessionId, row.size]))
  const targetsOf = grouped(targets, row => row.stepId)
  const turnsOf = grouped(turns, row => row.stepId)
  const linksTo = grouped(links, row => row.toStepId)
  const entryOf = new Map(entries.map(entry => [entry.turnId, entry]))
  const filmsOfStep = grouped(films, film => film.stepId)
  return steps.flatMap((row): PieceTurn[] => {
    const all = turnsOf.get(row.id) ?? []
    const material = rows.materials.get(row.materialVersionId ?? 0)
    const own = newest(filmsOfStep.get(row.id))
    const waits = (linksTo.get(row.id) ?? []).map((link): WaitState => waitOf(link.fromName, link.fromStatus, { ...link, windowed: link.windowed === 1 }, newest(filmsOfStep.get(link.fromStepId))))
    const partIds = (targetsOf.get(row.id) ?? []).map(each => each.partId)
    return nextTurns(all).map(turn => ({
      pieceId: row.pieceId,
      state: turnState({ row, material, turn, all, waits: [...waits, ...ownWaits(row, turn, all, own)], film: own[0] ?? null, entry: entryOf.get(turn.id) ?? null, size: sizeOf.get(entryOf.get(turn.id)?.sessionId ?? null) ?? 1, partIds }, names),
    }))
  })
}

/** The last film of a step: earlier coats of its round lie beneath it. */
const newest = (films: readonly PieceFilm[] | undefined): FilmState[] => (films ?? []).slice(-1).map(film => film.state)

/** Of each kind the one being done or the first that waits. A release waits for nothing but its time, so it shows beside a check. */
function nextTurns(turns: readonly TurnRow[]): TurnRow[] {
  const open = turns.filter(turn => turn.status === 'doing' || turn.status === 'waiting')
  const work = open.find(turn => turn.kind === 'work')
  if (work) return [open.find(turn => turn.status === 'doing') ?? work]
  return [open.find(turn => turn.kind === 'check'), open.find(turn => turn.kind === 'release')].filter(turn => turn !== undefined)
}

interface Asked { milestone: WaitState['milestone'], risk: WaitState['risk'], windowed: boolean }

function waitOf(step: string, status: WaitState['status'], link: Asked, films: readonly FilmState[]): WaitState {
  const asks = link.milestone === null && !link.windowed ? [] : films
  return {
    step, status, milestone: link.milestone, risk: link.risk, windowed: link.windowed,
    films: asks.map(film => ({
      moment: link.milestone === null ? null : rungAt(film, link.milestone), hold: film.hold,
      windows: film.windows.map(window => ({ ...window, fromStart: window.opensAt !== null && window.opensAt <= film.endedAt })),
    })),
  }
}

/** The rung asked for, or the next higher one where this material's ladder has not got it. */
function rungAt(film: FilmState, name: MilestoneName) {
  const wanted = milestoneNames.indexOf(name)
  return film.milestones.find(each => each.name === name) ?? film.milestones.find(each => milestoneNames.findIndex(one => one === each.name) >= wanted) ?? film.milestones[film.milestones.length - 1] ?? null
}

/** The next coat of a round waits for the one before it, whatever the schedule's links say. */
function ownWaits(row: StepRow, turn: TurnRow, all: readonly TurnRow[], films: readonly FilmState[]): WaitState[] {
  const again = turn.kind === 'work' && all.some(each => each.kind === 'work' && each.status === 'done')
  return again ? [waitOf(row.name, 'resting', { milestone: 'ready-to-recoat', risk: 'p90', windowed: true }, films)] : []
}

interface TurnParts { row: StepRow, material: MaterialRow | undefined, turn: TurnRow, all: readonly TurnRow[], waits: WaitState[], film: FilmState | null, entry: PieceRows['steps']['entries'][number] | null, size: number, partIds: number[] }

function turnState({ row: step, material, turn, all, waits, film, entry, size, partIds }: TurnParts, names: ReadonlyMap<number, string>): TurnState {
  const alike = all.filter(each => each.kind === turn.kind)
  return {
    turnId: turn.id, partIds, kind: turn.kind, name: turn.name, no: alike.indexOf(turn) + 1, of: alike.length, status: turn.status,
    step: { id: step.id, key: step.key, name: step.name, kind: step.kind, origin: step.origin, status: step.status, asideReason: step.asideReason, hold: step.hold, untilEnough: step.untilEnough === 1, materialVersionId: step.materialVersionId, material: material?.name ?? null, solventBorne: isSolventBorne(material), cautions: turn.kind === 'work' ? stepCautions(step.kind, material?.cautions ?? []) : [] },
    setupMin: step.setupMin, pieceMin: turn.kind === 'work' ? step.pieceMin : turn.minutes, cleanMin: step.cleanMin, dust: step.dust, notOnAt: turn.notOnAt,
    doing: turn.status === 'doing' ? { by: names.get(turn.doingMemberId ?? 0) ?? '', sinceAt: turn.beganAt ?? 0 } : null,
    wantedAt: wantedAt(turn, film),
    waits,
    plan: entry && { startsAt: entry.startsAt, endsAt: entry.endsAt, dueAt: entry.dueAt, memberId: entry.memberId, sessionId: entry.sessionId, sessionSize: size, lastStartAt: entry.lastStartAt, firstFew: entry.firstFew, lastStartFewAt: entry.lastStartFewAt, afterTest: entry.afterTest === 1 },
  }
}

function outAt({ milestones }: FilmState): number | null {
  const rung = milestones.find(each => each.name === 'out-of-clamps')
  return rung ? rung.reachedAt ?? rung.p90At : null
}

function wantedAt(turn: TurnRow, film: FilmState | null): number | null {
  if (!film) return null
  if (turn.kind === 'check' && turn.checkAfterMin !== null) return film.endedAt + turn.checkAfterMin * 60_000
  if (turn.kind === 'release') return outAt(film)
  return null
}
