import { article, days, figure, hours, libraryMaterial, memory, planning, practice, recoat, rung, sheet, tradePage } from '#shared/library/build'
import type { LibraryMaterial } from '#shared/library/types'

/** Grounds, primers, the sizes that seal them, and bole. */
export const groundMaterials: readonly LibraryMaterial[] = [
  libraryMaterial({
    key: 'acrylic-gesso', name: 'Acrylic gesso', kind: 'ground', solvent: 'water',
    reference: [21, 0.5, sheet('acrylic gesso')], minTempC: [10, practice], maxRh: [0.8, practice],
    milestones: [
      rung('set-to-touch', 'water', [10, 30, 60], practice),
      rung('dust-free', 'water', [15, 40, 75], planning),
      rung('ready-to-recoat', 'water', [60, 60, 240], sheet('acrylic gesso')),
      rung('tack-free', 'water', [60, 75, 240], planning),
      rung('dry-to-handle', 'water', hours(1, 2, 4), practice),
      rung('dry-to-sand-lightly', 'coalescence', hours(8, 16, 24), sheet('acrylic gesso')),
      rung('dry-to-sand-flat', 'coalescence', hours(16, 24, 48), planning),
      rung('cured', 'coalescence', days(3, 14, 30), practice),
    ],
    figures: [figure('wet film', [75, 150, 250], practice), figure('spread rate', [4, 7, 12], practice), figure('VOC', [0, 10, 30], memory)],
    cautions: ['sanding dust'],
  }),
  libraryMaterial({
    key: 'whiting-gesso', name: 'Whiting-and-glue gesso', kind: 'ground', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [15, practice], maxRh: [0.75, planning],
    milestones: [
      rung('set-to-touch', 'gel', [5, 10, 20], practice, 'It has gone matt and a light fingertip comes away clean.'),
      rung('ready-to-recoat', 'water', [20, 40, 120], practice, 'The shine has just gone; it is still cool.'),
      rung('dry-to-handle', 'water', hours(4, 8, 16), practice),
      rung('dry-to-sand-lightly', 'water', hours(12, 18, 36), practice),
      rung('dry-to-sand-flat', 'water', hours(18, 24, 48), practice),
      rung('cured', 'water', days(2, 3, 7), practice, 'It is no longer cool to the lips or the back of the hand, and rings dry under a fingernail.'),
    ],
    figures: [figure('wet film', [100, 150, 250], planning), figure('spread rate', [4, 6.7, 10], planning), figure('VOC', 0, practice)],
    cautions: ['glue pot', 'goes off', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'oil-primer', name: 'Oil or alkyd primer', kind: 'primer', solvent: 'mineral spirits', dryingOil: true,
    reference: [23, 0.5, sheet('alkyd primer')], minTempC: [10, sheet('one-pack oil paints')], maxTempC: [25, sheet('one-pack oil paints')], maxRh: [0.85, sheet('one-pack oil paints')],
    milestones: [
      rung('set-to-touch', 'solvent', hours(2, 4, 8), practice),
      rung('dust-free', 'oxidation', hours(3, 5, 10), planning),
      rung('tack-free', 'oxidation', hours(5, 8, 18), planning),
      rung('dry-to-handle', 'oxidation', hours(8, 12, 24), practice),
      rung('ready-to-recoat', 'oxidation', hours(8, 24, 24), practice, 'No tack, no smell.'),
      rung('dry-to-sand-lightly', 'oxidation', hours(8, 24, 72), tradePage('oil primer'), 'Fine paper lifts dry powder. Rubbery rolls mean it is not dry.'),
      rung('dry-to-sand-flat', 'oxidation', hours(24, 48, 96), planning),
      rung('cured', 'oxidation', days(7, 21, 28), sheet('oil primer')),
    ],
    windows: [recoat(1440, 10080, memory, 'Scuff the primer lightly', 10)],
    figures: [figure('wet film', [60, 75, 95], sheet('alkyd primer')), figure('spread rate', [10, 13, 17], sheet('alkyd primer')), figure('VOC', [300, 380, 450], memory)],
    cautions: ['cover slow oil', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'glue-size', name: 'Rabbit-skin glue size', kind: 'glue size', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [15, practice], maxRh: [0.7, practice],
    milestones: [
      rung('set-to-touch', 'gel', hours(1, 2, 4), practice),
      rung('dry-to-handle', 'water', hours(4, 6, 12), practice),
      rung('ready-to-recoat', 'water', hours(4, 12, 24), article('rabbit-skin glue size')),
      rung('cured', 'water', days(1, 1.5, 2), practice),
    ],
    windows: [recoat(720, 4320, memory, 'Size again, thinly', 5)],
    figures: [figure('spread rate', [6, 9, 14], planning), figure('VOC', 0, practice)],
    cautions: ['glue pot', 'goes off'],
  }),
  libraryMaterial({
    key: 'acrylic-size', name: 'Acrylic sizing layer', kind: 'glue size', solvent: 'water',
    reference: [21, 0.5, article('acrylic size under gesso')], minTempC: [10, practice], maxRh: [0.8, practice],
    milestones: [
      rung('set-to-touch', 'water', [10, 20, 45], planning),
      rung('dry-to-handle', 'water', hours(1, 2, 4), planning),
      rung('ready-to-recoat', 'coalescence', hours(8, 12, 24), article('acrylic size under gesso')),
      rung('cured', 'coalescence', days(3, 7, 14), planning),
    ],
    figures: [figure('wet film', [50, 80, 120], planning), figure('spread rate', [8, 12.5, 20], planning), figure('VOC', [0, 10, 40], memory)],
    cautions: ['water vapour'],
  }),
  libraryMaterial({
    key: 'bole', name: 'Bole', kind: 'bole', solvent: 'water',
    reference: [20, 0.5, planning], minTempC: [15, practice], maxRh: [0.75, planning],
    milestones: [
      rung('set-to-touch', 'gel', [3, 6, 12], planning),
      rung('ready-to-recoat', 'water', [15, 35, 90], practice, 'The shine has gone all over.'),
      rung('dry-to-handle', 'water', hours(2, 4, 8), practice),
      rung('dry-to-sand-lightly', 'water', hours(6, 12, 24), practice, 'A dry cloth brings up a shine and takes off no colour.'),
      rung('cured', 'water', days(1, 2, 4), practice),
    ],
    figures: [figure('spread rate', [8, 14, 20], planning), figure('VOC', 0, practice)],
    cautions: ['glue pot', 'goes off'],
  }),
]
