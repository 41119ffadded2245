import type { SheetLimits } from '#shared/library/solvents'
import { assumedSolvent, findSolvent, limitsOf } from '#shared/library/solvents'
import type { Solvent } from '#shared/library/types'
import { solvents } from '#shared/library/types'
import type { AirMove, CoatSize } from '#shared/terms'
import { closedAirChanges, mixingFactorOf } from '#shared/vapour/airflow'
import { airChanges } from '#shared/vapour/build-up'
import { evaporatingGrams, slowerTouchDry } from '#shared/vapour/emission'
import type { VapourInput, VapourLimits, VentilatedRoom, WetCoat } from '#shared/vapour/types'

/** A figure with the ends of its doubt, all in one unit. Null ends: none are known. */
export interface Span { low: number | null, typical: number, high: number | null }

/** What the owner read in the material's own data sheet; it wins over the library. Null: not read, or not in it. */
export interface SheetFigures extends SheetLimits {
  solventKey: string | null
  vocGramsPerLitre: number | null
  exemptGramsPerLitre: number | null
  spreadM2PerLitre: number | null
  touchDryMinutes: number | null
}

/** One coat as the studio's rows tell it. `solvent` null: nobody knows the material. Times in ms UTC and minutes, area in m2, thinner in g. */
export interface CoatFacts {
  at: number
  solvent: string | null
  voc: Span | null
  spread: Span | null
  areaM2: number | null
  sizeUnits: number
  size: CoatSize
  thinnerGrams: number
  /** Set-to-touch: the slow end of the sheet, and what is foretold at its give-till. */
  sheetTouchMinutes: number | null
  foretoldTouchMinutes: number | null
  sheet: SheetFigures | null
}

export type InputSource = 'told' | 'data sheet' | 'library' | 'foretold' | 'kind' | 'assumed'

/** One figure that a sum rests on, with where it comes from. `kind`: taken from what is usual for that kind of material. */
export interface UsedInput { name: VapourInput | 'thinner' | 'exempt solvent' | 'ceiling', value: number | null, source: InputSource }

export interface ReadCoat { likely: WetCoat, cautious: WetCoat, inputs: UsedInput[], grams: number }

/** Planning values on the cautious side, for what nobody gave: a strong solvent, a thick coat, a board for each size unit. */
export const assumedVoc = 750
export const assumedSpread = 5
export const assumedAreaM2 = 0.5
/** Fifty parts per million of a light co-solvent, mg/m3: what a water-borne film is held against while its sheet is not read (planning value). */
const waterLimitMgM3 = 184

const none: SheetLimits = { limitMgM3: null, ceilingMgM3: null, lelGramsM3: null }
const kindOf = (solvent: string | null): Solvent | null => solvents.find(each => each === solvent) ?? null

/** Whether a material gives off solvent as it dries. What nobody knows counts as one. */
export const isSolventBorne = (solvent: string | null) => solvent === null || (solvent !== 'water' && solvent !== 'none')

/** Whether a coat gives off anything that a room's air is reckoned for. */
export const givesVapour = ({ solvent, voc, sheet }: Pick<CoatFacts, 'solvent' | 'voc' | 'sheet'>) =>
  isSolventBorne(solvent) || (solvent === 'water' && (sheet?.vocGramsPerLitre ?? voc?.high ?? voc?.typical ?? 0) > 0)

/** Whether a vapour is spoken of in words only: the solvent that its sheet names, else the one usual for its kind, passes the skin, sensitises or can cause cancer. */
export function speaksInWords(solvent: string | null, solventKey: string | null): boolean {
  const kind = kindOf(solvent)
  const found = solventKey ? findSolvent(solventKey) : kind && assumedSolvent(kind)
  return (found?.textOnly ?? null) !== null
}

function readLimits({ solvent, sheet }: CoatFacts): { limits: VapourLimits, source: InputSource } {
  const figures = sheet ?? none
  const named = sheet?.solventKey ? findSolvent(sheet.solventKey) : null
  const kind = kindOf(solvent)
  const found = named ?? (kind === null ? null : assumedSolvent(kind))
  const limits = found ? limitsOf(found, figures) : { ...figures, limitMgM3: figures.limitMgM3 ?? (kind === 'water' ? waterLimitMgM3 : null), textOnly: null }
  return { limits, source: sheet?.limitMgM3 != null ? 'data sheet' : named ? 'library' : limits.limitMgM3 === null ? 'assumed' : 'kind' }
}

interface Amount { likely: number, cautious: number, source: InputSource }

function amount(name: VapourInput, told: number | null, from: Span | null, cautiousEnd: 'low' | 'high', otherwise: number): { name: VapourInput } & Amount {
  if (told !== null) return { name, likely: told, cautious: told, source: 'data sheet' }
  if (from === null) return { name, likely: otherwise, cautious: otherwise, source: 'assumed' }
  return { name, likely: from.typical, cautious: from[cautiousEnd] ?? from.typical, source: 'library' }
}

/**
 * A coat as the room's sums need it, twice: with the likely figures and with the cautious ends of their doubt. What nobody gave is stood in for on
 * the side of caution and named in `assumed`. `grams` is the likely mass. The slower of sheet and foretold counts for touch-dry, so that nothing learned shortens it.
 */
export function readCoat(facts: CoatFacts): ReadCoat {
  const { sheet } = facts
  const water = facts.solvent === 'water'
  const voc = amount('VOC', sheet?.vocGramsPerLitre ?? null, facts.voc, 'high', water ? 0 : assumedVoc)
  const spread = amount('spread rate', sheet?.spreadM2PerLitre ?? null, facts.spread, 'low', assumedSpread)
  const exempt = sheet?.exemptGramsPerLitre ?? 0
  const areaM2 = facts.areaM2 ?? assumedAreaM2 * facts.sizeUnits
  const sheetTouch = sheet?.touchDryMinutes ?? facts.sheetTouchMinutes
  const touchDryMinutes = slowerTouchDry(sheetTouch, facts.foretoldTouchMinutes)
  const { limits, source } = readLimits(facts)
  const assumed = [...facts.areaM2 === null ? ['area' as const] : [], ...[voc, spread].filter(each => each.source === 'assumed').map(each => each.name)]
  const coat = (end: 'likely' | 'cautious'): WetCoat => ({
    at: facts.at, carrier: water ? 'water' : 'solvent', touchDryMinutes, limits, assumed,
    massGrams: evaporatingGrams({ vocGramsPerLitre: voc[end], exemptGramsPerLitre: exempt, areaM2, spreadM2PerLitre: spread[end], coat: facts.size, thinnerGrams: facts.thinnerGrams }),
  })
  const likely = coat('likely')
  const touchSource: InputSource = touchDryMinutes === null ? 'assumed' : touchDryMinutes !== sheetTouch ? 'foretold' : sheet?.touchDryMinutes != null ? 'data sheet' : 'library'
  return {
    likely, cautious: coat('cautious'), grams: likely.massGrams,
    inputs: [
      { name: 'VOC', value: voc.cautious, source: voc.source }, { name: 'spread rate', value: spread.cautious, source: spread.source },
      { name: 'area', value: areaM2, source: facts.areaM2 === null ? 'assumed' : 'told' },
      ...facts.thinnerGrams > 0 ? [{ name: 'thinner' as const, value: facts.thinnerGrams, source: 'told' as const }] : [],
      ...exempt > 0 ? [{ name: 'exempt solvent' as const, value: exempt, source: 'data sheet' as const }] : [],
      { name: 'touch-dry', value: touchDryMinutes, source: touchSource },
      { name: 'limit', value: limits.limitMgM3, source },
      { name: 'ceiling', value: limits.ceilingMgM3, source: sheet?.ceilingMgM3 != null ? 'data sheet' : source === 'data sheet' ? 'kind' : source },
      { name: 'explosive limit', value: limits.lelGramsM3, source: sheet?.lelGramsM3 != null ? 'data sheet' : limits.lelGramsM3 === null ? 'assumed' : source === 'data sheet' ? 'kind' : source },
    ],
  }
}

/** A room as it is set up. `exhaustM3H` counts only while somebody has said that it runs. m3, m3/h, air changes an hour. */
export interface RoomSetUp { volumeM3: number | null, exhaustM3H: number | null, airChangesPerHour: number | null, airMoves: AirMove | null }

/** The air of a room: its running exhaust over its volume, or the changes somebody estimated, whichever is more; null when nobody said. */
export function ventilated({ volumeM3, exhaustM3H, airChangesPerHour, airMoves }: RoomSetUp, exhaustRuns: boolean): VentilatedRoom {
  const byExhaust = exhaustRuns && exhaustM3H !== null && volumeM3 !== null ? airChanges(exhaustM3H, volumeM3) : null
  const known = [byExhaust, airChangesPerHour].filter(each => each !== null)
  return {
    volumeM3,
    airChangesPerHour: known.length > 0 ? Math.max(...known) : null,
    // Without the fan that was measured, the windows are all there is.
    mixingFactor: airMoves === null ? null : mixingFactorOf(airMoves === 'measured fan' && !exhaustRuns ? 'windows only' : airMoves),
  }
}

/** The figures of a room with where each comes from, for the screen. */
export function roomInputs(setUp: RoomSetUp, air: VentilatedRoom): UsedInput[] {
  return [
    { name: 'volume', value: setUp.volumeM3, source: setUp.volumeM3 === null ? 'assumed' : 'told' },
    { name: 'air changes', value: air.airChangesPerHour ?? closedAirChanges, source: air.airChangesPerHour === null ? 'assumed' : 'told' },
    { name: 'mixing', value: air.mixingFactor ?? mixingFactorOf(null), source: air.mixingFactor === null ? 'assumed' : 'told' },
  ]
}
