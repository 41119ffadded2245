import { benchWork, coat, done, flatSanding, inWindow, lightSanding, look, part, recoatable, sandable, strainable } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

export const waterGildedFrame: LibrarySchedule = {
  key: 'water-gilded-frame',
  name: 'Water-gilded frame with oil-gilded sides',
  summary: 'Size, gesso in rounds, bole, leaf on wetted bole and burnishing on the front; shellac and slow oil size on the sides, leafed in its window. Both meet when the plates go on.',
  parts: [part('frame', 'Frame', 'back', { front: 'Front', sides: 'Sides' })],
  steps: [
    lightSanding('prepare', 'Sand the bare wood', [5, 15, 10], 'frame.front frame.sides'),
    coat('size', 'Hot glue size', 'glue-size', [20, 8, 10], 'frame.front frame.sides', { ground: 'porous', placeKind: 'rack' }),
    coat('gesso', 'Gesso, wet on just dull', 'whiting-gesso', [25, 6, 10], 'frame.front frame.sides', { perDay: 4, days: 2, placeKind: 'rack', checks: [look('Prick the pinholes and rub them in', 10, 2)] }),
    flatSanding('cut-gesso', 'Cut and smooth the gesso', [10, 40, 15], 'frame.front frame.sides'),
    coat('bole', 'Bole', 'bole', [20, 8, 10], 'frame.front', { perDay: 4, coatSize: 'thin', placeKind: 'rack' }),
    lightSanding('polish-bole', 'Polish the bole', [5, 10, 5], 'frame.front', { dust: 'none' }),
    benchWork('lay-leaf', 'Lay leaf on the wetted bole, air still', [15, 75, 10], 'frame.front', { placeKind: 'rack', checks: [look('Try the burnisher at a corner', 120, 2), look('Try the burnisher again', 180, 2)] }),
    benchWork('burnish', 'Burnish', [5, 45], 'frame.front'),
    coat('seal-sides', 'Shellac the sides', 'shellac', [5, 6, 5], 'frame.sides', { perDay: 2, coatSize: 'thin', placeKind: 'rack' }),
    coat('oil-size', 'Slow oil size on the sides', 'oil-size-slow', [10, 10, 10], 'frame.sides', { coatSize: 'thin', ground: 'sealed', placeKind: 'drying cabinet', checks: [look('Try the tack with a knuckle', 600, 2)] }),
    benchWork('leaf-sides', 'Lay leaf on the sides, air still', [10, 30, 5], 'frame.sides'),
    coat('last-coat', 'Thin shellac over the toned front', 'shellac', [5, 10, 5], 'frame.front', { coatSize: 'thin', ground: 'sealed', placeKind: 'rack' }),
    benchWork('fit', 'Fit plates and cord', [5, 10], 'frame'),
  ],
  links: [
    done('prepare', 'size'), recoatable('size', 'gesso'), sandable('gesso', 'cut-gesso', 'dry-to-sand-flat'), done('cut-gesso', 'bole'), sandable('bole', 'polish-bole'), done('polish-bole', 'lay-leaf'),
    done('lay-leaf', 'burnish'), done('cut-gesso', 'seal-sides'), recoatable('seal-sides', 'oil-size', 'dry-to-sand-lightly'),
    // Water, bole and rubbing come before the tacky size: nothing wet or dusty beside it.
    done('burnish', 'oil-size'), inWindow('oil-size', 'leaf-sides', 'at-tack', 'likely'), done('burnish', 'last-coat'),
    // The leaf is only as firm as the size under it.
    recoatable('oil-size', 'fit', 'cured'), done('leaf-sides', 'fit'), strainable('last-coat', 'fit', 'dry-to-handle'),
  ],
}
