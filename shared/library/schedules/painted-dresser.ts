import { benchWork, coat, done, inWindow, lightSanding, look, part, recoatable, sandable, strainable, turnOver } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

const carcase = 'carcase.outside carcase.top'

export const paintedDresser: LibrarySchedule = {
  key: 'painted-dresser',
  name: 'Dresser, painted: carcase, drawers, two-faced doors',
  summary: 'Hardware off and bagged. Carcase, drawer fronts and doors go their own way through sealer, paint and varnish; the doors one face at a time. All meet at the hanging.',
  parts: [
    part('carcase', 'Carcase', 'inside', { outside: 'Outside', top: 'Top' }),
    part('drawers', 'Drawers', 'box', { fronts: 'Fronts' }, 'carcase'),
    part('doors', 'Doors', 'edges', { front: 'Front', back: 'Back' }, 'carcase'),
    part('hardware', 'Bag of hardware', null, {}, 'carcase'),
  ],
  steps: [
    benchWork('strip-hardware', 'Take off doors and hardware, bag and label', [5, 30, 5], 'carcase drawers doors hardware'),
    benchWork('wash', 'Wash and degrease', [10, 30, 10], 'carcase drawers doors'),
    lightSanding('key', 'Rub down wet to give a key', [10, 40, 15], 'carcase drawers doors', { dust: 'none' }),
    coat('carcase-seal', 'Seal the carcase with shellac', 'shellac', [5, 20, 5], carcase, { ground: 'non-absorbent', placeKind: 'floor' }),
    coat('carcase-1', 'First paint on the carcase', 'chalk-paint', [5, 30, 10], carcase, { placeKind: 'floor' }),
    lightSanding('carcase-rub', 'Rub the carcase down lightly', [5, 15, 5], carcase),
    coat('carcase-2', 'Second paint on the carcase', 'chalk-paint', [5, 30, 10], carcase, { placeKind: 'floor' }),
    coat('carcase-varnish', 'Varnish the carcase', 'water-polyurethane', [5, 25, 10], carcase, { coatSize: 'thin', placeKind: 'floor', checks: [look('Look along the light for misses', 10, 2)] }),
    coat('top-varnish', 'Second varnish on the top', 'water-polyurethane', [5, 10, 5], 'carcase.top', { coatSize: 'thin', placeKind: 'floor' }),
    coat('drawers-seal', 'Seal the drawer fronts with shellac', 'shellac', [5, 8, 5], 'drawers.fronts', { ground: 'non-absorbent', placeKind: 'shelf' }),
    coat('drawers-paint', 'Paint the drawer fronts', 'chalk-paint', [5, 12, 5], 'drawers.fronts', { perDay: 2, placeKind: 'shelf' }),
    coat('drawers-varnish', 'Varnish the drawer fronts', 'water-polyurethane', [5, 10, 5], 'drawers.fronts', { coatSize: 'thin', placeKind: 'shelf' }),
    coat('doors-seal', 'Seal the door backs with shellac', 'shellac', [5, 8, 5], 'doors.back', { ground: 'non-absorbent', placeKind: 'rack' }),
    coat('doors-back', 'Paint the door backs', 'chalk-paint', [5, 10, 5], 'doors.back', { perDay: 2, placeKind: 'rack' }),
    coat('doors-back-varnish', 'Varnish the door backs', 'water-polyurethane', [5, 8, 5], 'doors.back', { coatSize: 'thin', placeKind: 'rack' }),
    turnOver('turn-doors', 'Turn the doors over onto points', [2, 2], 'doors'),
    coat('doors-front-seal', 'Seal the door fronts with shellac', 'shellac', [5, 8, 5], 'doors.front', { ground: 'non-absorbent', placeKind: 'rack' }),
    coat('doors-front', 'Paint the door fronts', 'chalk-paint', [5, 12, 5], 'doors.front', { perDay: 2, placeKind: 'rack' }),
    coat('doors-front-varnish', 'Varnish the door fronts', 'water-polyurethane', [5, 10, 5], 'doors.front', { coatSize: 'thin', placeKind: 'rack' }),
    benchWork('clean-hardware', 'Clean the hardware', [10, 20, 5], 'hardware'),
    benchWork('hang', 'Hang the doors, fit hardware, run the drawers', [10, 60, 10], 'carcase drawers doors hardware', { hands: 2 }),
  ],
  links: [
    done('strip-hardware', 'wash'), done('wash', 'key'), done('key', 'carcase-seal'), done('key', 'drawers-seal'), done('key', 'doors-seal'), done('strip-hardware', 'clean-hardware'),
    recoatable('carcase-seal', 'carcase-1', 'dry-to-sand-lightly'), sandable('carcase-1', 'carcase-rub'), done('carcase-rub', 'carcase-2'), recoatable('carcase-2', 'carcase-varnish', 'dry-to-sand-lightly'), inWindow('carcase-varnish', 'top-varnish'),
    recoatable('drawers-seal', 'drawers-paint', 'dry-to-sand-lightly'), recoatable('drawers-paint', 'drawers-varnish', 'dry-to-sand-lightly'),
    recoatable('doors-seal', 'doors-back', 'dry-to-sand-lightly'), recoatable('doors-back', 'doors-back-varnish', 'dry-to-sand-lightly'), recoatable('doors-back-varnish', 'turn-doors', 'dry-to-sand-flat'),
    done('turn-doors', 'doors-front-seal'), recoatable('doors-front-seal', 'doors-front', 'dry-to-sand-lightly'), recoatable('doors-front', 'doors-front-varnish', 'dry-to-sand-lightly'),
    strainable('top-varnish', 'hang', 'dry-to-sand-flat'), strainable('carcase-varnish', 'hang', 'dry-to-sand-flat'), strainable('drawers-varnish', 'hang', 'dry-to-sand-flat'), strainable('doors-front-varnish', 'hang', 'dry-to-sand-flat'), done('clean-hardware', 'hang'),
  ],
}
