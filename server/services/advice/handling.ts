import { eq, inArray } from 'drizzle-orm'
import { materialFigure } from '~~/db/schema'
import type { Asked, Said } from '~~/server/services/advice/films'
import { aboutTurn } from '~~/server/services/advice/soon'
import type { SoonTurn } from '~~/server/services/advice/soon'
import { scoped } from '~~/server/utils/scoped'
import { roomAirs } from '~~/server/work/air'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { airAt } from '#shared/air/room'
import { potLifeAt } from '#shared/drying/pot-life'
import { trackRoom } from '#shared/drying/tools'
import { clockTime, studioZone } from '#shared/time'
import { startAdviceText } from '#shared/words/advice-start'
import type { StartAdvice } from '#shared/words/advice-start'

/** A film had better not be wrapped before it has lain so long (a maker's own rule for packing). */
const packAfterMs = 48 * 60 * 60_000
/** A pot life this near its sheet's needs no word: a share of it, planning value. */
const nearSheet = 0.15

/** What hands are to mind at a step: how long a mix lasts, packing too early. */
export function handlingAdvice(asked: Asked, soon: readonly SoonTurn[]): Said[] {
  const say = (each: SoonTurn, facts: StartAdvice): Said => ({ ...aboutTurn(each), code: facts.code, text: startAdviceText(facts, asked.owner.units) })
  const pots = potLives(asked, soon)
  const zone = studioZone(asked.owner.zone)
  return soon.flatMap((each) => {
    const pot = pots(each)
    const newest = Math.max(0, ...(each.group?.films ?? []).filter(film => film.kind !== 'glue-up').map(film => film.endedAt))
    const early = each.turn.step.kind === 'packing' && each.at < newest + packAfterMs
    return [
      ...pot ? [say(each, pot)] : [],
      ...early ? [say(each, { code: 'pack-early', when: clockTime(newest + packAfterMs, { now: asked.now, zone }) })] : [],
    ]
  })
}

/** How long what is mixed for a turn lasts in its room, where that is not near what the sheet says. */
function potLives({ db, owner, now }: Asked, soon: readonly SoonTurn[]) {
  const ids = [...new Set(soon.flatMap(each => each.turn.step.materialVersionId ?? []))]
  const figures = ids.length === 0 ? [] : db.select().from(materialFigure).where(scoped(materialFigure, owner.id, inArray(materialFigure.versionId, ids), eq(materialFigure.name, 'pot life'))).all()
  const sheets = dryingMaterials(db, owner.id, figures.map(each => each.versionId))
  const airs = figures.length === 0 ? new Map() : roomAirs(db, owner, now)
  return ({ turn, at, group }: SoonTurn): StartAdvice | null => {
    const figure = figures.find(each => each.versionId === turn.step.materialVersionId)
    const sheet = figure && sheets.get(figure.versionId)
    const room = airs.get(group?.roomId ?? 0)
    const air = room && airAt(trackRoom(preparedMaterials.tools, room, at), at)
    if (!figure || !sheet || !air || air.assumed || !(air.tempC >= -20 && air.tempC <= 60)) return null
    const minutes = potLifeAt(figure.typical, sheet.reference.tempC, air.tempC)
    return Math.abs(minutes / figure.typical - 1) < nearSheet ? null : { code: 'pot-life', minutes, sheetMinutes: figure.typical, tempC: air.tempC }
  }
}
