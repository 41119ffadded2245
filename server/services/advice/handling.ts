import type { Asked, Said } from '~~/server/services/advice/films'
import { aboutTurn } from '~~/server/services/advice/soon'
import type { SoonTurn } from '~~/server/services/advice/soon'
import { roomAirs } from '~~/server/work/air'
import { openTimesOf } from '~~/server/work/open-times'
import { piecesOfMix, potsOf } from '~~/server/work/pots'
import type { Pot } from '~~/server/work/pots'
import { grouped } from '#shared/grouped'
import { clockTime, studioZone } from '#shared/time'
import { startAdviceText } from '#shared/words/advice-start'
import type { StartAdvice } from '#shared/words/advice-start'

/** A film had better not be wrapped before it has lain so long (a maker's own rule for packing). */
const packAfterMs = 48 * 60 * 60_000
/** A pot life this near its sheet's needs no word: a share of it, planning value. */
const nearSheet = 0.15

type Airs = ReturnType<typeof roomAirs>

/** What hands are to mind at a step: how long a mix lasts and how many times it is mixed, how long spread glue stays open, packing too early. */
export function handlingAdvice(asked: Asked, soon: readonly SoonTurn[]): Said[] {
  const say = (each: SoonTurn, facts: StartAdvice): Said => ({ ...aboutTurn(each), code: facts.code, text: startAdviceText(facts, asked.owner.units) })
  const airs = roomAirs(asked.db, asked.owner, asked.now)
  const pots = mixAdvice(asked, soon, airs)
  const open = openAdvice(asked, soon, airs)
  const zone = studioZone(asked.owner.zone)
  return soon.flatMap((each) => {
    const newest = Math.max(0, ...(each.group?.films ?? []).filter(film => film.kind !== 'glue-up').map(film => film.endedAt))
    const early = each.turn.step.kind === 'packing' && each.at < newest + packAfterMs
    return [
      ...pots(each).map(facts => say(each, facts)),
      ...open(each).map(facts => say(each, facts)),
      ...early ? [say(each, { code: 'pack-early', when: clockTime(newest + packAfterMs, { now: asked.now, zone }) })] : [],
    ]
  })
}

/** How long what is mixed for a turn lasts in its room, where that is not near what the sheet says, and how often it is mixed for all that is done with it there. */
function mixAdvice({ db, owner }: Asked, soon: readonly SoonTurn[], airs: Airs) {
  const potOf = potsOf(db, owner, [...new Set(soon.flatMap(each => each.turn.step.materialVersionId ?? []))], airs)
  const likeWork = ({ turn, group }: SoonTurn) => `${turn.step.materialVersionId} ${turn.step.kind} ${turn.name} ${group?.roomId}`
  const together = grouped(soon, likeWork)
  return (each: SoonTurn): StartAdvice[] => {
    const pot = potOf(each.turn.step.materialVersionId, each.group?.roomId ?? null, each.at)
    if (!pot) return []
    const several = severalMixes(pot, together.get(likeWork(each)) ?? [])
    const isNearSheet = Math.abs(pot.minutes / pot.sheetMinutes - 1) < nearSheet
    return [
      ...pot.tempC === null || isNearSheet ? [] : [{ code: 'pot-life', minutes: pot.minutes, sheetMinutes: pot.sheetMinutes, tempC: pot.tempC } as const],
      ...several ? [several] : [],
    ]
  }
}

function severalMixes(pot: Pot, alike: readonly SoonTurn[]): StartAdvice | null {
  const each = piecesOfMix(pot, Math.max(0, ...alike.map(({ turn }) => turn.pieceMin)))
  return each === null || each >= alike.length ? null : { code: 'several-mixes', minutes: pot.least, pieces: alike.length, each, mixes: Math.ceil(alike.length / each) }
}

/** A glue-up of one piece that takes longer than its glue stays open in its room, and the joint after it: spreading, joining and clamping are one step. */
function openAdvice({ db, owner }: Asked, soon: readonly SoonTurn[], airs: Airs) {
  const glued = soon.filter(({ turn }) => turn.step.kind === 'glue-up')
  const openOf = openTimesOf(db, owner, [...new Set(glued.flatMap(each => each.turn.step.materialVersionId ?? []))], airs)
  return ({ turn, group, at }: SoonTurn): StartAdvice[] => {
    const open = turn.step.kind === 'glue-up' ? openOf(turn.step.materialVersionId, group?.roomId ?? null, at) : null
    return open && turn.pieceMin > open.least + open.joined ? [{ code: 'open-time', minutes: open.least, joined: open.joined, takes: turn.pieceMin, room: open.room }] : []
  }
}
