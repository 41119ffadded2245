import { benchWork, coat, done, flatSanding, glueUp, inWindow, lightSanding, look, packing, part, recoatable, sandable, strainable } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

const sides = 'rails stiles'

export const mitredFrame: LibrarySchedule = {
  key: 'mitred-frame',
  name: 'Mitred frame, keyed and oiled',
  summary: 'Four sides glued in clamps, keyed across the corners and wiped with oil varnish; glass and backing are cut meanwhile and meet it at the fitting.',
  parts: [
    part('rails', 'Rails', 'back', { show: 'Show faces' }),
    part('stiles', 'Stiles', 'back', { show: 'Show faces' }, 'rails'),
    part('keys', 'Corner keys', null, {}, 'rails'),
    part('glazing', 'Glass and backing', 'edges', {}, 'rails'),
  ],
  steps: [
    benchWork('cut', 'Cut and shoot the mitres', [15, 20, 10], sides, { dust: 'some' }),
    glueUp('glue-up', 'Glue up the frame', 'pva-yellow', [10, 8, 5, 3], sides, { hold: 'clamps', placeKind: 'clamps', ground: 'porous', hands: 2, checks: [look('Wipe off squeeze-out, check it is square', 5, 2)] }),
    benchWork('slot', 'Cut the key slots', [15, 8, 10], sides, { dust: 'much' }),
    benchWork('make-keys', 'Make the keys', [15, 5, 5], 'keys', { dust: 'some' }),
    glueUp('glue-keys', 'Glue in the keys', 'pva-yellow', [5, 6, 5, 1], 'rails keys', { hold: 'clamps', placeKind: 'clamps', ground: 'porous' }),
    flatSanding('flush', 'Flush the keys and sand flat', [5, 20, 10], 'rails.show stiles.show'),
    coat('oil-1', 'First wipe of oil varnish', 'wiping-varnish', [5, 8, 5], 'rails.show stiles.show', { coatSize: 'thin', ground: 'porous', placeKind: 'rack', checks: [look('Wipe off what is left on top', 15, 2)] }),
    lightSanding('scuff', 'Rub down with fine paper', [5, 6, 5], 'rails.show stiles.show'),
    coat('oil-2', 'Second wipe of oil varnish', 'wiping-varnish', [5, 8, 5], 'rails.show stiles.show', { coatSize: 'thin', placeKind: 'rack', checks: [look('Wipe off what is left on top', 15, 2)] }),
    coat('oil-3', 'Third wipe of oil varnish', 'wiping-varnish', [5, 8, 5], 'rails.show stiles.show', { coatSize: 'thin', placeKind: 'rack', checks: [look('Wipe off what is left on top', 15, 2)] }),
    benchWork('glass', 'Cut glass, mount and backing', [10, 15, 5], 'glazing'),
    benchWork('fit', 'Fit glass and backing', [5, 15], 'rails stiles glazing'),
    packing('pack', 'Wrap with breathing paper, corners on', [10, 8], 'rails stiles glazing'),
  ],
  links: [
    done('cut', 'glue-up'), strainable('glue-up', 'slot', 'full-strength'), done('slot', 'glue-keys'), done('make-keys', 'glue-keys'), strainable('glue-keys', 'flush', 'full-strength'), done('flush', 'oil-1'),
    sandable('oil-1', 'scuff'), done('scuff', 'oil-2'), inWindow('oil-2', 'oil-3'),
    recoatable('oil-3', 'fit', 'dry-to-sand-flat'), done('glass', 'fit'), done('fit', 'pack'), strainable('oil-3', 'pack', 'dry-to-sand-flat'),
  ],
}
