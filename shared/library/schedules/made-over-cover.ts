import { benchWork, coat, done, glueUp, inWindow, lightSanding, look, part, recoatable, sandable, strainable, turnOver } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

const all = 'cover.front cover.back cover.edges'

export const madeOverCover: LibrarySchedule = {
  key: 'made-over-cover',
  name: 'Old object made over into a cover',
  summary: 'Ground coats with light sanding between, a dark ground, decoration laid outdoors, varnish on both faces with a touch-up. Spine boards are laminated in clamps meanwhile; all meet at the piercing and the sewing.',
  parts: [
    part('cover', 'Cover', 'inner edge', { front: 'Front', back: 'Back', edges: 'Edges' }),
    part('corners', 'Corners', null, {}, 'cover'),
    part('spine', 'Spine board', 'ends', {}, 'cover'),
    part('spine-layer', 'Second layer of the spine board', null, {}, 'spine'),
    part('cloth', 'Spine cloth', null, {}, 'spine'),
    part('block', 'Sections', null, {}, 'spine'),
  ],
  steps: [
    benchWork('wash', 'Wash and degrease', [10, 10, 5], 'cover'),
    lightSanding('key', 'Rub down wet to give a key', [5, 10, 10], all, { dust: 'none' }),
    coat('size', 'Sizing coat', 'acrylic-size', [5, 6, 5], all, { ground: 'non-absorbent', placeKind: 'rail' }),
    coat('ground-1', 'First ground coat', 'acrylic-gesso', [5, 8, 5], all, { placeKind: 'rail' }),
    lightSanding('sand-1', 'Sand lightly', [5, 6, 5], all),
    coat('ground-2', 'Second ground coat', 'acrylic-gesso', [5, 8, 5], all, { placeKind: 'rail' }),
    lightSanding('sand-2', 'Sand lightly, second time', [5, 6, 5], all),
    coat('dark-ground', 'Dark ground', 'craft-acrylic', [5, 8, 5], all, { perDay: 2, placeKind: 'rail' }),
    coat('decoration', 'Lay the decoration, outdoors', 'spray-enamel', [15, 10, 10], 'cover.front', { coatSize: 'thin', placeKind: 'bench', checks: [look('Lift the stencil', 5, 2)] }),
    coat('varnish-back', 'Varnish the back', 'water-polyurethane', [5, 6, 5], 'cover.back', { placeKind: 'shelf' }),
    coat('varnish-back-again', 'Varnish the back again', 'water-polyurethane', [5, 6, 5], 'cover.back', { placeKind: 'shelf' }),
    turnOver('turn', 'Turn over onto points', [2, 2], 'cover'),
    coat('varnish-1', 'Varnish the front', 'water-polyurethane', [5, 8, 5], 'cover.front cover.edges', { placeKind: 'shelf' }),
    coat('varnish-2', 'Second varnish on the front', 'water-polyurethane', [5, 8, 5], 'cover.front cover.edges', { placeKind: 'shelf', checks: [look('Look over in raking light and touch up', 30, 3)] }),
    coat('varnish-3', 'Third varnish on the front', 'water-polyurethane', [5, 8, 5], 'cover.front cover.edges', { placeKind: 'shelf' }),
    glueUp('laminate', 'Laminate the spine boards', 'pva-yellow', [10, 8, 5, 3], 'spine spine-layer', { hold: 'clamps', placeKind: 'clamps', ground: 'porous' }),
    benchWork('trim-spine', 'Trim and round the spine boards', [10, 10, 10], 'spine', { dust: 'some' }),
    glueUp('cloth-on', 'Put the cloth on the spine', 'pva-bookbinding', [10, 10, 5, 2], 'spine cloth', { hold: 'weight', placeKind: 'bench', ground: 'porous' }),
    benchWork('cut-corners', 'Cut and shape the corners', [10, 12, 5], 'corners'),
    glueUp('corners-on', 'Put the corners on', 'epoxy-quick', [5, 12, 5, 2], 'cover corners', { hold: 'clamps', placeKind: 'clamps', ground: 'non-absorbent' }),
    benchWork('template', 'Make the piercing template', [5, 10], 'block'),
    benchWork('fold', 'Fold the sections', [10, 30, 5], 'block', { mayRunOver: true }),
    benchWork('pierce', 'Pierce cover, spine and sections', [10, 15, 5], 'cover spine block', { dust: 'some' }),
    benchWork('sew', 'Sew through the spine and lace on the cover', [10, 90, 5], 'cover spine block', { mayRunOver: true }),
  ],
  links: [
    done('wash', 'key'), done('key', 'size'), recoatable('size', 'ground-1'), sandable('ground-1', 'sand-1'), done('sand-1', 'ground-2'), sandable('ground-2', 'sand-2'), done('sand-2', 'dark-ground'),
    recoatable('dark-ground', 'decoration', 'dry-to-sand-lightly'),
    // A front still fresh would print on the rack when the back is varnished, so the back waits for the enamel too.
    recoatable('decoration', 'varnish-back', 'cured'), inWindow('varnish-back', 'varnish-back-again'), recoatable('varnish-back-again', 'turn', 'dry-to-handle'),
    done('turn', 'varnish-1'), inWindow('varnish-1', 'varnish-2'), inWindow('varnish-2', 'varnish-3'),
    strainable('laminate', 'trim-spine', 'full-strength'), done('trim-spine', 'cloth-on'), strainable('cloth-on', 'pierce', 'full-strength'),
    done('cut-corners', 'corners-on'), strainable('varnish-3', 'corners-on', 'dry-to-sand-flat'), strainable('corners-on', 'pierce', 'full-strength'),
    done('template', 'fold'), done('fold', 'pierce'), done('pierce', 'sew'),
  ],
}
