import { inArray } from 'drizzle-orm'
import { pieceStep } from '~~/db/schema'
import { boardAdvice } from '~~/server/services/advice/board'
import type { Asked, Said } from '~~/server/services/advice/films'
import { solventRoomsNow } from '~~/server/services/advice/films'
import { overAdvice } from '~~/server/services/advice/over'
import { handlingAdvice } from '~~/server/services/advice/handling'
import { leafAdvice } from '~~/server/services/advice/leaf'
import { aboutTurn, soonTurns } from '~~/server/services/advice/soon'
import type { SoonTurn } from '~~/server/services/advice/soon'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { airOf, roomAirs } from '~~/server/work/air'
import { benchesOf } from '~~/server/work/benches'
import { clocks } from '~~/server/work/film-cases'
import { dryingMaterials } from '~~/server/work/materials'
import { predictCoat } from '#shared/drying/predict'
import type { Advice } from '#shared/drying/types'
import { leavesFilm } from '#shared/step-kinds'
import { beforeText, besideSolventBefore } from '#shared/words/advice'

/** Advice about what is about to go on, be joined or be packed: what would come of beginning as soon as it may. */
export function turnAdvice(asked: Asked): Said[] {
  const soon = soonTurns(asked)
  if (soon.length === 0) return []
  return [...airAdvice(asked, soon), ...overAdvice(asked, soon), ...boardAdvice(asked, soon), ...handlingAdvice(asked, soon), ...leafAdvice(asked, soon)]
}

/** What the air of the room would do to a coat or a glue line that went on as soon as it may. Pieces that would fare alike are reckoned once. */
function airAdvice({ db, owner, now, gaps }: Asked, soon: readonly SoonTurn[]): Said[] {
  const wets = soon.filter(({ turn }) => turn.step.materialVersionId !== null && leavesFilm(turn.step.kind))
  const benches = benchesOf(db, owner.id, dryingMaterials(db, owner.id, wets.flatMap(each => each.turn.step.materialVersionId ?? [])))
  const howOf = howDone(db, owner.id, wets)
  const clockOf = clocks(roomAirs(db, owner, now), airOf(owner), now)
  const solvent = solventRoomsNow(db, owner.id, now)
  const known = new Map<string, Advice[]>()
  return wets.flatMap((each) => {
    const { turn, at, group } = each
    const versionId = turn.step.materialVersionId ?? 0
    const how = howOf.get(turn.step.id)
    const material = benches.materialFor(versionId, 0)
    if (!how || !material) return []
    const key = [versionId, how.size, how.ground, group?.roomId, at].join(' ')
    const advice = known.get(key) ?? predictCoat(material, { appliedAt: at, size: how.size, ground: how.ground }, [{ clock: clockOf(group?.roomId ?? null), fromAt: at, toAt: null }], { now, hazeGapC: gaps.get(versionId) }).advice
    known.set(key, advice)
    const beside = solvent.has(group?.roomId ?? 0)
    return advice.flatMap(({ code, facts }): Said[] => {
      const text = (beside ? besideSolventBefore(code) : null) ?? beforeText(facts, owner.units)
      return text === null ? [] : [{ ...aboutTurn(each), code, text, gapC: facts.code === 'blush' ? facts.gapC : null }]
    })
  })
}

function howDone(db: Database, studioId: number, soon: readonly SoonTurn[]) {
  const ids = [...new Set(soon.map(each => each.turn.step.id))]
  const rows = ids.length === 0 ? [] : db.select({ id: pieceStep.id, size: pieceStep.coatSize, ground: pieceStep.ground }).from(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.id, ids))).all()
  return new Map(rows.map(row => [row.id, row]))
}
