import { benchWork, coat, done, lightSanding, look, part, recoatable, sandable, strainable, inWindow, turnOver } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

const wipe = [look('Wipe off what is left on top', 15, 3), look('Wipe off what has bled back', 60, 2)]

export const oiledBowl: LibrarySchedule = {
  key: 'oiled-bowl',
  name: 'Bowl in oil and varnish',
  summary: 'A flood of linseed oil to feed the wood, then three thin wipes of oil varnish, held by the foot; the foot is done last, turned over.',
  parts: [part('bowl', 'Bowl', 'foot', { inside: 'Inside', outside: 'Outside', foot: 'Foot' })],
  steps: [
    lightSanding('sand', 'Sand through the grades', [5, 25, 10], 'bowl.inside bowl.outside bowl.foot'),
    coat('feed', 'Flood with linseed oil', 'boiled-linseed-oil', [5, 6, 5], 'bowl.inside bowl.outside', { coatSize: 'flood', ground: 'porous', placeKind: 'shelf', checks: wipe }),
    coat('wipe-1', 'First wipe of oil varnish', 'wiping-varnish', [5, 6, 5], 'bowl.inside bowl.outside', { coatSize: 'thin', placeKind: 'shelf', checks: wipe }),
    lightSanding('denib', 'Rub down with fine pad', [5, 5, 5], 'bowl.inside bowl.outside'),
    coat('wipe-2', 'Second wipe of oil varnish', 'wiping-varnish', [5, 6, 5], 'bowl.inside bowl.outside', { coatSize: 'thin', placeKind: 'shelf', checks: wipe }),
    coat('wipe-3', 'Third wipe of oil varnish', 'wiping-varnish', [5, 6, 5], 'bowl.inside bowl.outside', { coatSize: 'thin', placeKind: 'shelf', checks: wipe }),
    turnOver('turn', 'Turn over onto a soft ring', [1, 1], 'bowl'),
    coat('foot', 'Oil varnish on the foot', 'wiping-varnish', [5, 2, 5], 'bowl.foot', { coatSize: 'thin', ground: 'porous', placeKind: 'shelf', checks: [look('Wipe off what is left on top', 15, 1)] }),
    benchWork('buff', 'Buff and sign', [5, 8], 'bowl'),
  ],
  links: [
    done('sand', 'feed'), recoatable('feed', 'wipe-1'), sandable('wipe-1', 'denib'), done('denib', 'wipe-2'), inWindow('wipe-2', 'wipe-3'),
    recoatable('wipe-3', 'turn', 'dry-to-sand-lightly'), done('turn', 'foot'), strainable('foot', 'buff', 'dry-to-handle'), recoatable('wipe-3', 'buff', 'dry-to-sand-flat'),
  ],
}
