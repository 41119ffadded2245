import type { DayPeg } from '#shared/shelf'
import { staggerLabels } from '#shared/strip'
import type { LabelPlace } from '#shared/strip'

/** A peg with its place on the lying ruler. */
export interface PlacedPeg { peg: DayPeg, place: LabelPlace }

/** Below this height of the window a second row of pegs would hide too much of the studio, px. */
const tallWindow = 1000

/** Rows of pegs above the lying ruler, which stays in sight: with more, the studio itself would be out of it. */
export const rulerRows = (windowHeight: number) => windowHeight < tallWindow ? 1 : 2
const widestPeg = 360

/** About how wide a peg is drawn, px: its longer line in the fine type and the room beside it. */
const pegWidth = ({ title, says }: DayPeg) => Math.min(widestPeg, Math.max(title.length * 7.6, says.length * 6.8) + 32)

/** Where pegs stand side by side, or null when they do not all find a row. */
function placed(pegs: readonly DayPeg[], share: (at: number) => number, boxWidth: number, rows: number): PlacedPeg[] | null {
  const places = staggerLabels(pegs.map(peg => ({ x: share(peg.at), width: Math.min(1, pegWidth(peg) / Math.max(1, boxWidth)) })), rows)
  const found = pegs.flatMap((peg, index) => {
    const place = places[index]
    return place ? [{ peg, place }] : []
  })
  return found.length === pegs.length ? found : null
}

/**
 * The pegs that the lying ruler has room for, in the order of the hours, and how many it has not.
 * What presses comes before what comes first, and both before the rest.
 * @param share where an instant lies on the ruler, 0..1
 * @param boxWidth of the ruler, px
 * @param rows of pegs at most
 */
export function fitPegs(pegs: readonly DayPeg[], share: (at: number) => number, boxWidth: number, rows: number): { pegs: PlacedPeg[], more: number } {
  let fits: PlacedPeg[] = []
  for (const peg of [...pegs].sort((a, b) => Number(b.urgent) - Number(a.urgent) || a.at - b.at)) {
    const tried = placed([...fits.map(each => each.peg), peg].sort((a, b) => a.at - b.at), share, boxWidth, rows)
    if (tried) fits = tried
  }
  return { pegs: fits, more: pegs.length - fits.length }
}
