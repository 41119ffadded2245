import { benchWork, coat, done, flatSanding, lightSanding, look, part, recoatable, sandable, strainable } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

export const frenchPolishedPanel: LibrarySchedule = {
  key: 'french-polished-panel',
  name: 'French-polished panel in sessions',
  summary: 'Fadding in, bodying up until it is enough, a rest for it to sink, bodying again, stiffing and spiriting off. The back is balanced with plain shellac between sessions.',
  parts: [part('panel', 'Panel', 'back', { front: 'Front', back: 'Back' })],
  steps: [
    flatSanding('sand', 'Scrape and sand the panel', [5, 30, 10], 'panel.front panel.back'),
    coat('wash', 'Wash coat of shellac', 'shellac', [5, 5, 5], 'panel.front', { coatSize: 'thin', ground: 'porous', placeKind: 'rack' }),
    lightSanding('denib', 'Cut back lightly', [5, 6, 5], 'panel.front'),
    coat('back', 'Shellac the back', 'shellac', [5, 5, 5], 'panel.back', { perDay: 2, ground: 'porous', placeKind: 'rack' }),
    coat('fad-in', 'Fad in', 'shellac', [10, 15, 5], 'panel.front', { perDay: 3, coatSize: 'thin', placeKind: 'rack' }),
    coat('body-up', 'Body up until the grain is full', 'shellac', [10, 25, 5], 'panel.front', { perDay: 3, days: 3, untilEnough: true, coatSize: 'thin', placeKind: 'rack', mayRunOver: true }),
    lightSanding('cut-back', 'Cut back after sinking', [5, 12, 5], 'panel.front'),
    coat('body-again', 'Body up again', 'shellac', [10, 25, 5], 'panel.front', { perDay: 3, days: 2, untilEnough: true, coatSize: 'thin', placeKind: 'rack', mayRunOver: true }),
    coat('stiff', 'Stiff the pad, straight strokes', 'shellac', [10, 15, 5], 'panel.front', { perDay: 2, coatSize: 'thin', placeKind: 'rack' }),
    benchWork('spirit-off', 'Spirit off the oil', [10, 12, 5], 'panel.front', { placeKind: 'rack', checks: [look('Look for bloom of oil', 60, 2)] }),
    benchWork('hang', 'Burnish and fit', [5, 15], 'panel'),
  ],
  links: [
    done('sand', 'wash'), sandable('wash', 'denib'), done('sand', 'back'), strainable('back', 'fad-in', 'dry-to-handle'), done('denib', 'fad-in'), recoatable('fad-in', 'body-up', 'dry-to-sand-lightly'),
    sandable('body-up', 'cut-back', 'cured'), done('cut-back', 'body-again'), recoatable('body-again', 'stiff', 'dry-to-sand-flat'), recoatable('stiff', 'spirit-off', 'dry-to-sand-lightly'),
    done('spirit-off', 'hang'), strainable('stiff', 'hang', 'cured'),
  ],
}
