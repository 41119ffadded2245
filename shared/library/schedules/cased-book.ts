import { benchWork, coat, done, glueUp, inWindow, lightSanding, look, part, recoatable, sandable, strainable } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

export const casedBook: LibrarySchedule = {
  key: 'cased-book',
  name: 'Cased sewn book, painted and varnished',
  summary: 'The case is covered and grounded while the block is sewn and lined. They meet in the press. Decoration and varnish go on the finished book, held by its block.',
  parts: [
    part('case', 'Case', 'inside', { front: 'Front', back: 'Back', edges: 'Edges' }),
    part('cloth', 'Covering cloth', null, {}, 'case'),
    part('block', 'Text block', 'fore-edge', {}, 'case'),
    part('lining', 'Spine lining', null, {}, 'block'),
  ],
  steps: [
    benchWork('cut-boards', 'Cut boards and cloth', [10, 12, 5], 'case cloth'),
    glueUp('cover-case', 'Cover the boards', 'pva-bookbinding', [10, 14, 10, 2], 'case cloth', { hold: 'press', placeKind: 'press', ground: 'porous', checks: [look('Change the blotters', 60, 3)] }),
    coat('size', 'Sizing coat', 'acrylic-size', [5, 5, 5], 'case.front case.back case.edges', { ground: 'porous', placeKind: 'rail' }),
    coat('ground-1', 'First ground coat', 'acrylic-gesso', [5, 7, 5], 'case.front case.back case.edges', { placeKind: 'rail' }),
    lightSanding('sand-1', 'Sand lightly', [5, 5, 5], 'case.front case.back case.edges'),
    coat('ground-2', 'Second ground coat', 'acrylic-gesso', [5, 7, 5], 'case.front case.back case.edges', { placeKind: 'rail' }),
    lightSanding('sand-2', 'Sand lightly, second time', [5, 6, 5], 'case.front case.back case.edges'),
    coat('colour', 'Painted ground', 'craft-acrylic', [5, 8, 5], 'case.front case.back case.edges', { perDay: 2, placeKind: 'rail' }),
    benchWork('fold', 'Fold and press the sections', [10, 30, 5], 'block', { mayRunOver: true }),
    benchWork('sew', 'Sew the block', [10, 75, 5], 'block', { mayRunOver: true }),
    glueUp('line-spine', 'Glue and line the spine', 'pva-bookbinding', [5, 10, 5, 2], 'block lining', { hold: 'press', placeKind: 'press', ground: 'porous' }),
    benchWork('trim', 'Trim the block, fix the endpapers', [5, 15, 5], 'block'),
    glueUp('case-in', 'Case in, with waxed sheets', 'pva-bookbinding', [10, 12, 5, 3], 'case block', { hold: 'press', placeKind: 'press', ground: 'porous', checks: [look('Change the sheets inside the boards', 60, 4)] }),
    benchWork('open-joints', 'Open the book, set the joints', [2, 5], 'case block'),
    coat('decoration', 'Lay the decoration', 'craft-acrylic', [10, 25, 10], 'case.front case.back', { coatSize: 'thin', placeKind: 'rail' }),
    coat('varnish-1', 'First varnish', 'water-polyurethane', [5, 8, 5], 'case.front case.back case.edges', { coatSize: 'thin', placeKind: 'rail', checks: [look('Look along the light for misses', 10, 1)] }),
    coat('varnish-2', 'Second varnish', 'water-polyurethane', [5, 8, 5], 'case.front case.back case.edges', { coatSize: 'thin', placeKind: 'rail' }),
    benchWork('last-look', 'Last look and label', [5, 5], 'case block'),
  ],
  links: [
    done('cut-boards', 'cover-case'), recoatable('cover-case', 'size', 'full-strength'), recoatable('size', 'ground-1'), sandable('ground-1', 'sand-1'), done('sand-1', 'ground-2'),
    sandable('ground-2', 'sand-2'), done('sand-2', 'colour'), strainable('colour', 'case-in', 'dry-to-sand-flat'),
    done('fold', 'sew'), done('sew', 'line-spine'), strainable('line-spine', 'trim', 'full-strength'), done('trim', 'case-in'),
    strainable('case-in', 'open-joints', 'out-of-clamps'), done('open-joints', 'decoration'), recoatable('decoration', 'varnish-1', 'dry-to-sand-lightly'),
    inWindow('varnish-1', 'varnish-2'), strainable('varnish-2', 'last-look', 'dry-to-handle'),
  ],
}
