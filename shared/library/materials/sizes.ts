import { article, days, figure, hours, libraryMaterial, memory, planning, practice, recoat, rung } from '#shared/library/build'
import type { LibraryMaterial } from '#shared/library/types'

/** Sizes that leaf is laid on: the window is the job. */
export const sizeMaterials: readonly LibraryMaterial[] = [
  libraryMaterial({
    key: 'oil-size-quick', name: 'Oil gold size, quick (3 h)', kind: 'size', solvent: 'mineral spirits', dryingOil: true,
    reference: [20, 0.5, practice], minTempC: [15, practice], maxRh: [0.75, practice],
    milestones: [
      rung('at-tack', 'oxidation', hours(1, 2, 3), article('quick oil gold size')),
      rung('cured', 'oxidation', days(2, 4, 7), practice),
    ],
    windows: [recoat(60, 300, article('quick oil gold size'), 'Rub down and size again', 20)],
    figures: [figure('wet film', [20, 30, 45], planning), figure('spread rate', [15, 20, 30], planning), figure('VOC', [250, 350, 450], memory)],
    cautions: ['cover slow oil'],
  }),
  libraryMaterial({
    key: 'oil-size-slow', name: 'Oil gold size, slow (12 h)', kind: 'size', solvent: 'mineral spirits', dryingOil: true,
    reference: [20, 0.5, practice], minTempC: [15, practice], maxRh: [0.75, practice],
    milestones: [
      rung('at-tack', 'oxidation', hours(10, 12, 18), article('slow oil gold size')),
      rung('cured', 'oxidation', days(3, 14, 30), practice),
    ],
    windows: [recoat(600, 1440, article('slow oil gold size'), 'Rub down and size again', 20)],
    figures: [figure('wet film', [40, 60, 80], planning), figure('spread rate', 17, article('slow oil gold size')), figure('VOC', [100, 250, 400], memory)],
    cautions: ['cover slow oil'],
  }),
  libraryMaterial({
    key: 'water-size', name: 'Water-based gold size', kind: 'size', solvent: 'water',
    reference: [20, 0.5, practice], minTempC: [10, practice],
    milestones: [
      rung('at-tack', 'water', [10, 15, 30], article('water-based gold size'), 'It has gone from milky to clear, and a knuckle clicks.'),
      rung('cured', 'coalescence', days(1, 3, 7), planning),
    ],
    windows: [recoat(15, null, article('water-based gold size'), 'Wipe off the dust and size again', 15)],
    figures: [figure('wet film', [20, 30, 50], planning), figure('spread rate', [20, 30, 40], planning), figure('VOC', [0, 20, 60], memory)],
    cautions: ['water vapour'],
  }),
]
