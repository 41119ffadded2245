import { article, days, figure, hours, libraryMaterial, memory, planning, practice, recoat, rung, sheet, tradePage } from '#shared/library/build'
import type { LibraryMaterial } from '#shared/library/types'

const together = 'Both faces feel dry and pull at a knuckle without stringing.'

/** Glues that cure by reaction or moisture, and those that are joined once the solvent has gone. */
export const otherGlueMaterials: readonly LibraryMaterial[] = [
  libraryMaterial({
    key: 'polyurethane-glue', name: 'Polyurethane glue', kind: 'glue', film: 'joint', solvent: 'none', isocyanate: true, glovesUntil: 'cured',
    reference: [21, 0.5, sheet('polyurethane glue')], minTempC: [10, practice], dryAirFloor: [0.006, sheet('moisture-cure polyurethane')],
    milestones: [
      rung('out-of-clamps', 'moisture', [45, 120, 240], sheet('polyurethane glue')),
      rung('full-strength', 'moisture', hours(6, 12, 24), sheet('polyurethane glue')),
      rung('cured', 'moisture', hours(24, 24, 48), planning, null),
    ],
    figures: [figure('open time', [10, 15, 25], practice), figure('closed assembly', 25, article('polyurethane glue')), figure('spread rate', [5, 7, 9], planning)],
    cautions: ['dry air'],
  }),
  libraryMaterial({
    key: 'cyanoacrylate', name: 'Cyanoacrylate glue', kind: 'glue', film: 'joint', solvent: 'none',
    reference: [20, 0.5, practice], minTempC: [10, practice], maxRh: [0.75, article('cyanoacrylate glue')], dryAirFloor: [0.0058, planning],
    milestones: [
      rung('out-of-clamps', 'moisture', [1 / 6, 0.5, 1], tradePage('cyanoacrylate glue'), null),
      rung('full-strength', 'moisture', hours(8, 12, 24), tradePage('cyanoacrylate glue')),
      rung('cured', 'moisture', hours(12, 24, 36), planning, null),
    ],
    figures: [figure('open time', [5 / 60, 0.25, 0.5], tradePage('cyanoacrylate glue'))],
    cautions: ['cyanoacrylate', 'one try', 'dry air'],
  }),
  libraryMaterial({
    key: 'epoxy-quick', name: 'Epoxy glue, quick (5 min)', kind: 'glue', film: 'joint', solvent: 'none', glovesUntil: 'cured',
    reference: [22, 0.5, planning], minTempC: [12, practice],
    milestones: [
      rung('out-of-clamps', 'reaction', [10, 15, 30], practice),
      rung('full-strength', 'reaction', hours(24, 36, 72), sheet('quick epoxy glue')),
      rung('cured', 'reaction', days(1, 3, 7), planning, null),
    ],
    figures: [figure('open time', [3, 4, 5], practice), figure('pot life', [3, 4, 5], sheet('quick epoxy glue')), figure('thickness exponent', 0, planning)],
    cautions: ['epoxy skin', 'part-cured dust', 'exotherm'],
  }),
  libraryMaterial({
    key: 'epoxy-slow', name: 'Epoxy glue, slow', kind: 'glue', film: 'joint', solvent: 'none', glovesUntil: 'cured',
    reference: [22, 0.5, planning], minTempC: [15, memory], maxRh: [0.8, memory],
    milestones: [
      rung('out-of-clamps', 'reaction', hours(6, 8, 12), memory),
      rung('full-strength', 'reaction', hours(24, 48, 72), memory),
      rung('cured', 'reaction', days(5, 7, 10), memory, null),
    ],
    figures: [figure('open time', [20, 40, 60], memory), figure('pot life', [20, 30, 45], memory), figure('thickness exponent', 0, planning)],
    cautions: ['epoxy skin', 'part-cured dust', 'exotherm'],
  }),
  libraryMaterial({
    key: 'contact-solvent', name: 'Contact cement, solvent-based', kind: 'glue', film: 'joint', solvent: 'aliphatic solvent',
    reference: [21, 0.5, planning], minTempC: [18, memory], maxRh: [0.8, planning],
    milestones: [
      rung('at-tack', 'solvent', [15, 20, 30], tradePage('contact cement'), together),
      rung('out-of-clamps', 'solvent', [20, 30, 60], planning, null),
      rung('full-strength', 'solvent', hours(24, 48, 72), practice),
      rung('cured', 'solvent', days(3, 5, 7), planning, null),
    ],
    windows: [recoat(15, 120, practice, 'Coat both faces again', 10)],
    figures: [figure('open time', [60, 90, 120], practice), figure('spread rate', [3, 4, 5], planning), figure('VOC', [550, 650, 750], memory)],
    cautions: ['one try', 'blush'],
  }),
  libraryMaterial({
    key: 'contact-water', name: 'Contact cement, water-based', kind: 'glue', film: 'joint', solvent: 'water',
    reference: [21, 0.5, planning], minTempC: [18, memory],
    milestones: [
      rung('at-tack', 'water', [20, 30, 60], memory, together),
      rung('out-of-clamps', 'water', [30, 45, 90], planning, null),
      rung('full-strength', 'joint', hours(24, 48, 72), practice),
      rung('cured', 'joint', days(3, 5, 7), sheet('water-based contact cement'), null),
    ],
    windows: [recoat(30, 150, sheet('water-based contact cement'), 'Coat both faces again', 10)],
    figures: [figure('open time', [120, 150, 180], sheet('water-based contact cement')), figure('spread rate', [4, 5, 6], planning), figure('VOC', [0, 20, 80], memory)],
    cautions: ['one try', 'ammonia'],
  }),
  libraryMaterial({
    key: 'spray-adhesive', name: 'Spray adhesive', kind: 'glue', film: 'joint', solvent: 'aliphatic solvent',
    reference: [21, 0.5, planning], minTempC: [15, practice], maxRh: [0.8, planning],
    milestones: [
      rung('at-tack', 'solvent', [1, 2, 5], sheet('spray adhesive'), together),
      rung('out-of-clamps', 'solvent', [2, 5, 15], planning, null),
      rung('full-strength', 'solvent', hours(12, 18, 24), practice),
      rung('cured', 'solvent', hours(24, 36, 48), planning, null),
    ],
    windows: [recoat(1, 15, sheet('spray adhesive'), 'Spray both faces again', 5)],
    figures: [figure('open time', [1, 8, 15], sheet('spray adhesive')), figure('spread rate', [5, 8, 12], planning), figure('VOC', [450, 550, 650], memory)],
    cautions: ['aerosol', 'one try', 'blush'],
  }),
]
