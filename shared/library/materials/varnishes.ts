import { article, days, figure, hours, libraryMaterial, memory, planning, practice, recoat, rung, sheet, tradePage } from '#shared/library/build'
import type { LibraryMaterial } from '#shared/library/types'

const noSmell = 'No tack, no smell.'
const powder = 'Not cool to the touch, and it sands to dry powder.'

/** Varnishes, drying oils and wax. */
export const varnishMaterials: readonly LibraryMaterial[] = [
  libraryMaterial({
    key: 'acrylic-varnish', name: 'Acrylic varnish', kind: 'varnish', solvent: 'water',
    reference: [20, 0.5, practice], minTempC: [15, practice], maxRh: [0.75, practice],
    milestones: [
      rung('set-to-touch', 'water', [20, 30, 60], practice),
      rung('dust-free', 'water', [25, 40, 80], planning),
      rung('tack-free', 'water', hours(1, 2, 4), planning),
      rung('ready-to-recoat', 'water', hours(3, 3, 6), practice),
      rung('dry-to-handle', 'water', hours(3, 4, 8), practice),
      rung('cured', 'coalescence', days(7, 14, 28), practice),
    ],
    figures: [figure('wet film', [60, 100, 150], practice), figure('spread rate', [6.7, 10, 16], planning), figure('VOC', [20, 60, 120], memory)],
    cautions: ['over damp paint', 'water vapour', 'blocking'],
  }),
  libraryMaterial({
    key: 'water-polyurethane', name: 'Water-based polyurethane varnish', kind: 'varnish', solvent: 'water',
    reference: [21, 0.5, sheet('water-based polyurethane')], minTempC: [13, practice], maxRh: [0.75, practice],
    milestones: [
      rung('set-to-touch', 'water', [20, 30, 60], sheet('water-based polyurethane')),
      rung('dust-free', 'water', [25, 45, 90], planning),
      rung('tack-free', 'water', hours(1, 1.5, 3), planning),
      rung('ready-to-recoat', 'water', hours(2, 3, 4), sheet('water-based polyurethane'), powder),
      rung('dry-to-sand-lightly', 'water', hours(2, 3, 6), practice, powder),
      rung('dry-to-handle', 'water', hours(2, 4, 8), practice),
      rung('dry-to-sand-flat', 'coalescence', hours(24, 36, 72), planning),
      rung('cured', 'coalescence', days(3, 7, 21), sheet('water-based polyurethane')),
    ],
    windows: [recoat(180, 1440, memory, 'Scuff between coats', 10)],
    figures: [figure('wet film', [70, 80, 100], sheet('water-based floor finish')), figure('spread rate', [10, 12, 14], sheet('water-based floor finish')), figure('VOC', [80, 200, 275], memory)],
    cautions: ['water vapour', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'oil-polyurethane', name: 'Oil-based polyurethane varnish', kind: 'varnish', solvent: 'mineral spirits', dryingOil: true,
    reference: [23, 0.5, sheet('oil-based polyurethane')], minTempC: [10, sheet('oil-based polyurethane')], maxRh: [0.85, sheet('oil-based polyurethane')],
    milestones: [
      rung('set-to-touch', 'solvent', hours(1.5, 3, 6), tradePage('oil-based polyurethane')),
      rung('dust-free', 'oxidation', hours(2, 4, 8), planning),
      rung('tack-free', 'oxidation', hours(3, 5, 10), planning),
      rung('ready-to-recoat', 'oxidation', hours(3, 6, 12), sheet('oil-based polyurethane'), noSmell),
      rung('dry-to-sand-lightly', 'oxidation', hours(4, 8, 24), sheet('oil-based polyurethane'), noSmell),
      rung('dry-to-handle', 'oxidation', hours(6, 12, 24), practice),
      rung('dry-to-sand-flat', 'oxidation', hours(24, 48, 96), planning),
      rung('cured', 'oxidation', days(14, 30, 45), sheet('oil-based polyurethane')),
    ],
    windows: [recoat(360, 1440, tradePage('oil-based polyurethane'), 'Scuff between coats', 10)],
    figures: [figure('wet film', [70, 80, 100], sheet('oil-based polyurethane')), figure('spread rate', [10, 12, 14], sheet('oil-based polyurethane')), figure('VOC', [350, 450, 550], memory)],
    cautions: ['cover slow oil', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'wiping-varnish', name: 'Wiping varnish or oil-and-varnish blend', kind: 'varnish', solvent: 'mineral spirits', dryingOil: true,
    reference: [21, 0.5, sheet('wiping varnish')], minTempC: [10, practice], maxRh: [0.8, practice],
    milestones: [
      rung('set-to-touch', 'solvent', hours(1, 3, 8), practice),
      rung('dust-free', 'oxidation', hours(1.5, 4, 10), planning),
      rung('tack-free', 'oxidation', hours(3, 8, 16), planning, 'A tissue pressed on it leaves no fibres.'),
      rung('ready-to-recoat', 'oxidation', hours(6, 12, 24), sheet('wiping varnish'), noSmell),
      rung('dry-to-handle', 'oxidation', hours(6, 12, 24), practice),
      rung('dry-to-sand-lightly', 'oxidation', hours(8, 24, 48), practice),
      rung('dry-to-sand-flat', 'oxidation', hours(24, 48, 96), planning),
      rung('cured', 'oxidation', days(7, 30, 90), practice),
    ],
    windows: [recoat(720, 4320, memory, 'Scuff between coats', 10)],
    figures: [figure('wet film', [15, 30, 50], practice), figure('spread rate', [15, 20, 25], practice), figure('VOC', [350, 450, 600], memory)],
    cautions: ['cover slow oil', 'sanding dust'],
  }),
  libraryMaterial({
    key: 'boiled-linseed-oil', name: 'Boiled linseed oil', kind: 'oil', solvent: 'none', dryingOil: true,
    reference: [20, 0.5, practice], minTempC: [10, practice], maxRh: [0.8, practice],
    milestones: [
      rung('set-to-touch', 'oxidation', hours(12, 24, 72), practice),
      rung('ready-to-recoat', 'oxidation', hours(24, 24, 72), practice, 'Nothing comes off on a dry cloth.'),
      rung('dry-to-sand-lightly', 'oxidation', hours(24, 36, 72), practice),
      rung('dry-to-handle', 'oxidation', hours(24, 48, 96), practice),
      rung('cured', 'oxidation', days(7, 30, 60), practice),
    ],
    figures: [figure('spread rate', [10, 15, 25], planning), figure('VOC', [0, 30, 250], memory)],
    cautions: ['cover slow oil'],
  }),
  libraryMaterial({
    key: 'tung-oil', name: 'Pure tung oil', kind: 'oil', solvent: 'none', dryingOil: true,
    reference: [20, 0.5, practice], minTempC: [10, practice], maxRh: [0.8, practice],
    milestones: [
      rung('set-to-touch', 'oxidation', hours(16, 36, 72), article('pure tung oil')),
      rung('ready-to-recoat', 'oxidation', days(1, 2, 7), article('pure tung oil'), 'Nothing comes off on a dry cloth.'),
      rung('dry-to-handle', 'oxidation', days(2, 4, 7), practice),
      rung('dry-to-sand-lightly', 'oxidation', days(2, 4, 7), practice),
      rung('cured', 'oxidation', days(30, 90, 180), article('pure tung oil')),
    ],
    figures: [figure('spread rate', [10, 15, 25], planning), figure('VOC', 0, memory)],
    cautions: ['cover slow oil'],
  }),
  libraryMaterial({
    key: 'wax', name: 'Paste wax', kind: 'wax', solvent: 'mineral spirits',
    reference: [20, 0.5, practice], minTempC: [15, practice],
    milestones: [
      rung('set-to-touch', 'solvent', [10, 20, 60], memory, 'It has hazed over and a cloth drags.'),
      rung('dry-to-handle', 'solvent', hours(1, 2, 4), memory),
      rung('ready-to-recoat', 'solvent', hours(4, 12, 24), memory, 'Buffed, and no drag left.'),
      rung('cured', 'solvent', days(3, 7, 21), memory),
    ],
    figures: [figure('wet film', [10, 20, 30], planning), figure('spread rate', [20, 30, 50], planning), figure('VOC', [350, 500, 650], memory)],
    cautions: ['wax early'],
  }),
]
