import { article, days, figure, hours, libraryMaterial, memory, planning, practice, recoat, rung, sheet, tradePage } from '#shared/library/build'
import type { LibraryMaterial } from '#shared/library/types'

/** Shellac, lacquers and the coating resin. */
export const lacquerMaterials: readonly LibraryMaterial[] = [
  libraryMaterial({
    key: 'shellac', name: 'Shellac', kind: 'shellac', solvent: 'alcohol',
    reference: [21, 0.5, sheet('shellac')], minTempC: [10, practice], maxRh: [0.65, article('shellac')],
    milestones: [
      rung('set-to-touch', 'solvent', [5, 10, 20], practice),
      rung('dust-free', 'solvent', [6, 12, 25], planning),
      rung('tack-free', 'solvent', [10, 20, 40], planning),
      rung('dry-to-handle', 'solvent', [20, 30, 60], practice),
      rung('ready-to-recoat', 'solvent', [30, 45, 60], sheet('shellac')),
      rung('dry-to-sand-lightly', 'solvent', [45, 60, 120], practice),
      rung('dry-to-sand-flat', 'solvent', hours(12, 24, 48), planning),
      rung('cured', 'solvent', days(1, 3, 7), practice),
    ],
    figures: [figure('wet film', [40, 75, 100], practice), figure('spread rate', [10, 13, 25], planning), figure('VOC', [500, 600, 730], memory)],
    cautions: ['blush', 'old stock', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'nitrocellulose-lacquer', name: 'Nitrocellulose lacquer', kind: 'lacquer', solvent: 'lacquer thinner',
    reference: [25, 0.5, sheet('nitrocellulose lacquer')], minTempC: [15, practice], maxRh: [0.6, sheet('nitrocellulose lacquer')],
    milestones: [
      rung('set-to-touch', 'solvent', [10, 12, 15], sheet('nitrocellulose lacquer')),
      rung('dust-free', 'solvent', [10, 15, 20], planning),
      rung('tack-free', 'solvent', [15, 25, 40], planning),
      rung('dry-to-handle', 'solvent', [30, 40, 60], sheet('nitrocellulose lacquer')),
      rung('ready-to-recoat', 'solvent', [45, 60, 120], tradePage('nitrocellulose lacquer')),
      rung('dry-to-sand-lightly', 'solvent', hours(2, 12, 24), practice),
      rung('dry-to-sand-flat', 'solvent', days(1, 2, 4), tradePage('nitrocellulose lacquer')),
      rung('cured', 'solvent', days(14, 21, 30), article('nitrocellulose lacquer')),
    ],
    windows: [recoat(60, 720, sheet('nitrocellulose lacquer'), 'Scuff first', 15)],
    figures: [figure('wet film', [125, 140, 150], sheet('nitrocellulose lacquer')), figure('spread rate', [6.7, 7.1, 8], sheet('nitrocellulose lacquer')), figure('VOC', [550, 680, 780], memory)],
    cautions: ['blush', 'mixed residue', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'waterborne-lacquer', name: 'Water-borne lacquer', kind: 'lacquer', solvent: 'water',
    reference: [21, 0.45, practice], minTempC: [10, practice], maxRh: [0.7, practice],
    milestones: [
      rung('set-to-touch', 'water', [10, 20, 40], practice),
      rung('dust-free', 'water', [12, 25, 50], planning),
      rung('tack-free', 'water', [18, 40, 80], planning),
      rung('ready-to-recoat', 'water', [20, 60, 120], tradePage('water-borne lacquer')),
      rung('dry-to-handle', 'water', hours(1, 2, 4), practice),
      rung('dry-to-sand-lightly', 'coalescence', hours(1, 2, 4), practice),
      rung('dry-to-sand-flat', 'coalescence', hours(24, 48, 96), planning),
      rung('cured', 'coalescence', days(4, 10, 21), practice),
    ],
    windows: [recoat(60, 4320, memory, 'Scuff lightly', 10)],
    figures: [figure('wet film', [50, 75, 100], tradePage('water-borne lacquer')), figure('spread rate', [10, 13, 20], planning), figure('VOC', [100, 200, 300], memory)],
    cautions: ['water vapour', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'epoxy-coating', name: 'Epoxy coating resin', kind: 'resin', solvent: 'none', mustLieLevel: true, glovesUntil: 'cured',
    reference: [22, 0.5, sheet('epoxy resin')], minTempC: [15, sheet('epoxy resin')], maxTempC: [25, sheet('epoxy resin')], maxRh: [0.7, sheet('epoxy resin')],
    milestones: [
      rung('set-to-touch', 'reaction', hours(6, 7, 8), sheet('epoxy resin')),
      rung('dust-free', 'reaction', hours(6, 8, 10), planning),
      rung('tack-free', 'reaction', hours(7, 10, 16), planning),
      rung('dry-to-handle', 'reaction', hours(8, 12, 24), practice),
      rung('dry-to-sand-lightly', 'reaction', hours(24, 30, 36), sheet('epoxy resin')),
      rung('dry-to-sand-flat', 'reaction', hours(36, 48, 72), planning),
      rung('cured', 'reaction', days(4, 7, 10), sheet('epoxy resin')),
    ],
    windows: [recoat(180, 480, practice, 'Wash, dry and sand dull', 30)],
    figures: [
      figure('wet film', [100, 300, 500], practice), figure('spread rate', [2, 3.3, 10], planning), figure('pot life', [9, 10.5, 12], sheet('epoxy resin')),
      figure('working time', [60, 65, 70], sheet('epoxy resin')), figure('thickness exponent', 0, planning), figure('VOC', [0, 20, 50], memory),
    ],
    cautions: ['epoxy skin', 'part-cured dust', 'amine blush', 'exotherm', 'sanding dust'],
  }),
]
