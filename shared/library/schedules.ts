import { casedBook } from '#shared/library/schedules/cased-book'
import { frenchPolishedPanel } from '#shared/library/schedules/french-polished-panel'
import { lacqueredInstrument } from '#shared/library/schedules/lacquered-instrument'
import { laminatedBoards } from '#shared/library/schedules/laminated-boards'
import { madeOverCover } from '#shared/library/schedules/made-over-cover'
import { mitredFrame } from '#shared/library/schedules/mitred-frame'
import { oiledBowl } from '#shared/library/schedules/oiled-bowl'
import { paintedDresser } from '#shared/library/schedules/painted-dresser'
import { paintedWaxedBox } from '#shared/library/schedules/painted-waxed-box'
import { resinTray } from '#shared/library/schedules/resin-tray'
import { waterGildedFrame } from '#shared/library/schedules/water-gilded-frame'
import type { LibrarySchedule } from '#shared/library/types'

/** Every finishing schedule of the starter library, by name. */
export const librarySchedules: readonly LibrarySchedule[] = [
  laminatedBoards, oiledBowl, casedBook, paintedDresser, frenchPolishedPanel, lacqueredInstrument, mitredFrame, madeOverCover, paintedWaxedBox, resinTray, waterGildedFrame,
]
