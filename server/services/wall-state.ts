import type { FilmState, PieceState, StudioState, TurnState } from '#shared/schemas/piece-state'
import { leavesFilm } from '#shared/step-kinds'
import { sheetWords } from '#shared/words/sheet'

/**
 * The studio as a wall link may see it: what a verdict is read from, and nothing beyond. Orders, batches, materials and
 * mixes, minutes, plans and people stay inside; the one name that is told is of whoever opens a shut room. Oily rags nobody has
 * answered for are told: they burn whoever reads of them.
 */
export function wallState(state: StudioState): StudioState {
  return {
    ...state,
    rooms: state.rooms.map(room => ({ ...room, air: null, waterSpeed: null, keepOut: room.keepOut && { ...room.keepOut, operatorId: null } })),
    pieces: state.pieces.map(wallPiece), sessions: [], moved: [], hours: [], witnesses: [], handTests: [],
  }
}

function wallPiece(piece: PieceState): PieceState {
  return {
    ...piece, batch: { id: 0, name: '' }, order: null, stepsDone: 0, stepsOf: 0,
    groups: piece.groups.map(group => ({ ...group, films: group.films.map(wallFilm) })),
    turns: piece.turns.filter(speaks).map(wallTurn),
  }
}

/** Whether the material is known stays; which it is does not. */
const wallFilm = (film: FilmState): FilmState => ({ ...film, actId: 0, step: null, material: film.material === null ? null : '', materialVersionId: null, windows: [] })

/** The turns a verdict reads: one that somebody is at, and the next coat or glue-up with its planned start. */
const speaks = ({ doing, kind, step, plan }: TurnState) => doing !== null || (kind === 'work' && leavesFilm(step.kind) && plan !== null)

function wallTurn(turn: TurnState): TurnState {
  return {
    ...turn, waits: [], setupMin: 0, pieceMin: 0, cleanMin: 0, wantedAt: null,
    step: { ...turn.step, key: '', asideReason: null, materialVersionId: null, material: null, cautions: [] },
    doing: turn.doing && { by: sheetWords.somebody, sinceAt: turn.doing.sinceAt },
    plan: turn.plan && { ...turn.plan, memberId: null, sessionId: null, sessionSize: 1, lastStartAt: null, firstFew: null, lastStartFewAt: null },
  }
}
