import { editionOfSheet } from '~~/server/services/material-sheets'
import type { StudioRow } from '~~/server/services/sessions'
import { airOf } from '~~/server/work/air'
import { preparedMaterials } from '~~/server/work/materials'
import { roomClock } from '#shared/drying/clock'
import type { Edition } from '#shared/data-sheet/complete'
import { prepareMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import { findCaution } from '#shared/library/cautions'
import { hazes } from '#shared/library/types'
import type { PreviewBody, PreviewWire, ReadyWire } from '#shared/schemas/material-edit'
import type { MilestoneName } from '#shared/terms'

const asked: readonly MilestoneName[] = ['ready-to-recoat', 'at-tack', 'out-of-clamps', 'dry-to-handle', 'cured']

/** When a normal coat put on now in the studio's usual air would be so far, likely and to be given till, in whole minutes from now. */
function readyTimes(edition: Edition, studio: StudioRow, now: number): ReadyWire[] {
  const figure = (name: string) => edition.figures.find(each => each.name === name)?.typical ?? null
  // Prepared here and thrown away: what is typed letter by letter must not fill the tables that are kept.
  const prepared = prepareMaterial({
    reference: { tempC: figure('reference temperature') ?? 20, rh: figure('reference humidity') ?? 0.5 }, minTempC: figure('minimum temperature'), maxRh: figure('humidity ceiling'), dryAirFloor: null,
    blushes: hazes(edition.solvent), milestones: edition.rungs, windows: edition.windows.map(({ fromMin, toMin }) => [fromMin, toMin] as const),
  }, preparedMaterials.tools)
  const clock = roomClock(airOf(studio), now, preparedMaterials.tools)
  const { milestones } = predictCoat(prepared, { appliedAt: now, size: 'normal', ground: 'primed' }, [{ clock, fromAt: now, toAt: null }], { now })
  const minutes = (at: number | null) => at === null ? null : Math.max(1, Math.round((at - now) / 60_000))
  return asked.flatMap((name): ReadyWire[] => milestones.filter(each => each.name === name).map(each => ({ name, likelyMin: minutes(each.likelyAt), giveTillMin: minutes(each.p90At) })))
}

/** What a sheet as typed so far would mean in the studio's usual air. */
export function previewSheet(studio: StudioRow, body: PreviewBody, now: number): PreviewWire {
  const usual = { tempC: studio.usualTempC, rh: studio.usualRh }
  const done = editionOfSheet(body, studio.units)
  if (!done.ok) return { fields: done.fields, ready: [], usual, standIns: 0, cautions: [] }
  const { edition } = done
  return {
    fields: {}, usual, ready: readyTimes(edition, studio, now),
    standIns: edition.rungs.filter(each => each.key === 'planning value').length,
    cautions: edition.cautions.map(key => findCaution(key)?.text ?? key),
  }
}
