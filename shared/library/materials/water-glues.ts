import { article, days, figure, hours, libraryMaterial, memory, planning, practice, rung, sheet, support, tradePage } from '#shared/library/build'
import type { LibraryMaterial } from '#shared/library/types'

const boardDry = 'The board is no longer cool to the cheek and lies flat when it is lifted.'

/** Glues and pastes that set by losing water into wood, paper or board. */
export const waterGlueMaterials: readonly LibraryMaterial[] = [
  libraryMaterial({
    key: 'pva-white', name: 'White wood glue (PVA)', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [10, practice],
    milestones: [
      rung('out-of-clamps', 'joint', [20, 30, 60], tradePage('white wood glue')),
      rung('full-strength', 'joint', hours(24, 24, 36), tradePage('white wood glue')),
      rung('cured', 'joint', days(1, 2, 4), planning, null),
    ],
    figures: [figure('open time', [5, 8, 10], practice), figure('closed assembly', [10, 12, 15], practice), figure('spread rate', [4, 5, 7], planning)],
    cautions: ['keep warm'],
  }),
  libraryMaterial({
    key: 'pva-yellow', name: 'Yellow wood glue (PVA, indoor)', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [21, 0.5, sheet('yellow wood glue')], minTempC: [10, sheet('yellow wood glue')],
    milestones: [
      rung('out-of-clamps', 'joint', [30, 45, 60], sheet('yellow wood glue')),
      rung('full-strength', 'joint', hours(24, 24, 36), sheet('yellow wood glue')),
      rung('cured', 'joint', days(2, 4, 7), sheet('yellow wood glue'), null),
    ],
    figures: [figure('open time', [4, 5, 8], sheet('yellow wood glue')), figure('closed assembly', [10, 12, 15], sheet('yellow wood glue')), figure('spread rate', [4, 5, 7], planning)],
    cautions: ['keep warm'],
  }),
  libraryMaterial({
    key: 'pva-water-resistant', name: 'Yellow wood glue (PVA, water-resistant)', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [21, 0.5, sheet('water-resistant wood glue')], minTempC: [8.3, support('water-resistant wood glue')],
    milestones: [
      rung('out-of-clamps', 'joint', [30, 45, 60], sheet('water-resistant wood glue')),
      rung('full-strength', 'joint', hours(24, 24, 36), support('water-resistant wood glue')),
      rung('cured', 'joint', days(2, 4, 7), planning, null),
    ],
    figures: [figure('open time', [5, 8, 10], sheet('water-resistant wood glue')), figure('closed assembly', [20, 22, 25], sheet('water-resistant wood glue')), figure('spread rate', [4, 5, 7], planning)],
    cautions: ['keep warm'],
  }),
  libraryMaterial({
    key: 'pva-tacky', name: 'Tacky craft glue (PVA)', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [10, practice],
    milestones: [
      rung('out-of-clamps', 'joint', [15, 30, 60], tradePage('tacky craft glue')),
      rung('full-strength', 'joint', hours(24, 36, 72), tradePage('tacky craft glue')),
      rung('cured', 'joint', days(2, 3, 5), planning, null),
    ],
    figures: [figure('open time', [3, 5, 10], tradePage('tacky craft glue')), figure('spread rate', [4, 5, 7], planning)],
    cautions: ['keep warm'],
  }),
  libraryMaterial({
    key: 'pva-bookbinding', name: 'Bookbinding glue (PVA)', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [10, practice],
    milestones: [
      rung('out-of-clamps', 'joint', hours(1, 12, 24), article('bookbinding PVA'), boardDry),
      rung('full-strength', 'joint', hours(24, 24, 36), article('bookbinding PVA')),
      rung('cured', 'joint', days(1, 2, 3), planning, boardDry),
    ],
    figures: [figure('open time', [1, 3, 5], article('bookbinding PVA')), figure('spread rate', [6, 8, 12], planning)],
    cautions: ['keep warm'],
  }),
  libraryMaterial({
    key: 'paste', name: 'Wheat or rice paste', kind: 'paste', film: 'joint', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [10, practice], maxRh: [0.85, planning],
    milestones: [
      rung('dry-to-handle', 'joint', hours(3, 5, 6), article('wheat paste'), 'The paper no longer slides.'),
      rung('out-of-clamps', 'joint', days(1, 2, 3), article('wheat paste'), boardDry),
      rung('full-strength', 'joint', days(1, 2, 3), practice),
      rung('cured', 'joint', days(2, 3, 5), planning, boardDry),
    ],
    figures: [figure('open time', [15, 18, 20], article('wheat paste')), figure('spread rate', [5, 7, 10], planning)],
    cautions: ['goes off'],
  }),
  libraryMaterial({
    key: 'methyl-cellulose', name: 'Methyl cellulose paste', kind: 'paste', film: 'joint', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [10, practice], maxRh: [0.85, planning],
    milestones: [
      rung('out-of-clamps', 'joint', hours(3, 6, 12), memory, boardDry),
      rung('full-strength', 'joint', days(1, 1.5, 2), memory),
      rung('cured', 'joint', days(1, 2, 3), memory, boardDry),
    ],
    figures: [figure('open time', [15, 20, 25], memory), figure('spread rate', [5, 7, 10], planning)],
  }),
  libraryMaterial({
    key: 'hot-hide-glue', name: 'Hot hide glue', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [21, 0.5, article('hot hide glue')], minTempC: [21, article('hot hide glue')],
    milestones: [
      rung('set-to-touch', 'gel', [1, 2, 10], article('hot hide glue'), 'The squeezed-out glue has gelled like jelly.'),
      rung('out-of-clamps', 'joint', [10, 60, 90], article('hot hide glue')),
      rung('full-strength', 'joint', hours(24, 24, 72), practice),
      rung('cured', 'joint', days(2, 3, 7), practice, null),
    ],
    figures: [figure('open time', [1, 2, 10], article('hot hide glue')), figure('pot life', hours(4, 8, 24), planning), figure('spread rate', [4, 5, 7], planning)],
    cautions: ['glue pot', 'goes off'],
  }),
  libraryMaterial({
    key: 'liquid-hide-glue', name: 'Liquid hide glue', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [21, 0.5, planning], minTempC: [10, practice],
    milestones: [
      rung('out-of-clamps', 'joint', hours(1, 4, 12), memory),
      rung('full-strength', 'joint', hours(24, 24, 36), practice),
      rung('cured', 'joint', days(1, 2, 4), planning, null),
    ],
    figures: [figure('open time', [8, 9, 10], memory), figure('closed assembly', [25, 27, 30], article('liquid hide glue')), figure('spread rate', [4, 5, 7], planning)],
    cautions: ['old stock'],
  }),
  libraryMaterial({
    key: 'casein-glue', name: 'Casein glue', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [10, memory],
    milestones: [
      rung('out-of-clamps', 'joint', hours(2, 4, 8), article('casein glue')),
      rung('full-strength', 'joint', hours(24, 36, 72), article('casein glue')),
      rung('cured', 'joint', days(3, 5, 7), practice, null),
    ],
    figures: [figure('open time', [15, 30, 45], article('casein glue')), figure('pot life', hours(8, 12, 24), article('casein glue')), figure('spread rate', [4, 5, 7], planning)],
    cautions: ['casein lime', 'goes off'],
  }),
]
