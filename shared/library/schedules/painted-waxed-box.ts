import { benchWork, coat, done, glueUp, lightSanding, look, part, recoatable, sandable, strainable, turnOver } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

export const paintedWaxedBox: LibrarySchedule = {
  key: 'painted-waxed-box',
  name: 'Painted and waxed box with a lined lid',
  summary: 'The box is glued and painted; the lid is painted on both faces and lined with paper. Wax goes on a day after the last paint, then the hinges bring them together.',
  parts: [
    part('box', 'Box', 'inside', { outside: 'Outside' }),
    part('bottom', 'Bottom', null, {}, 'box'),
    part('lid', 'Lid', 'edges', { top: 'Top', underside: 'Underside' }, 'box'),
    part('lining', 'Lining paper', null, {}, 'lid'),
  ],
  steps: [
    glueUp('glue-box', 'Glue up the box', 'pva-white', [10, 10, 5, 3], 'box bottom', { hold: 'clamps', placeKind: 'clamps', ground: 'porous' }),
    lightSanding('clean-up', 'Clean up the joints', [5, 12, 10], 'box.outside'),
    coat('box-1', 'First paint on the box', 'chalk-paint', [5, 10, 5], 'box.outside', { ground: 'porous', placeKind: 'shelf' }),
    lightSanding('box-rub', 'Rub the box down lightly', [5, 6, 5], 'box.outside'),
    coat('box-2', 'Second paint on the box', 'chalk-paint', [5, 10, 5], 'box.outside', { placeKind: 'shelf' }),
    coat('box-wax', 'Wax the box', 'wax', [5, 10, 5], 'box.outside', { coatSize: 'thin', placeKind: 'shelf', checks: [look('Buff', 30, 5)] }),
    coat('lid-1', 'First paint on the lid top', 'chalk-paint', [5, 6, 5], 'lid.top', { ground: 'porous', placeKind: 'shelf' }),
    turnOver('turn-lid', 'Turn the lid over onto points', [1, 1], 'lid'),
    coat('lid-under', 'Paint the lid underside', 'chalk-paint', [5, 5, 5], 'lid.underside', { ground: 'porous', placeKind: 'shelf' }),
    glueUp('line-lid', 'Line the lid with paper', 'paste', [10, 10, 5, 1], 'lid lining', { hold: 'weight', placeKind: 'bench', checks: [look('Change the blotters', 30, 2), look('Change the blotters again', 180, 2)] }),
    coat('lid-2', 'Second paint on the lid top', 'chalk-paint', [5, 6, 5], 'lid.top', { placeKind: 'shelf' }),
    coat('lid-wax', 'Wax the lid', 'wax', [5, 8, 5], 'lid.top', { coatSize: 'thin', placeKind: 'shelf', checks: [look('Buff', 30, 4)] }),
    benchWork('hinge', 'Fit hinges and catch', [10, 20, 5], 'box lid'),
  ],
  links: [
    strainable('glue-box', 'clean-up', 'full-strength'), done('clean-up', 'box-1'), sandable('box-1', 'box-rub'), done('box-rub', 'box-2'), recoatable('box-2', 'box-wax', 'dry-to-sand-lightly'),
    recoatable('lid-1', 'turn-lid', 'dry-to-sand-lightly'), done('turn-lid', 'lid-under'), recoatable('lid-under', 'line-lid', 'dry-to-sand-flat'), strainable('lid-1', 'line-lid', 'dry-to-sand-flat'),
    recoatable('line-lid', 'lid-2', 'out-of-clamps'), recoatable('lid-2', 'lid-wax', 'dry-to-sand-lightly'),
    strainable('box-wax', 'hinge', 'ready-to-recoat'), strainable('lid-wax', 'hinge', 'ready-to-recoat'), strainable('line-lid', 'hinge', 'full-strength'),
  ],
}
