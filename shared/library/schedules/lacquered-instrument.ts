import { benchWork, coat, done, flatSanding, inWindow, levelling, lightSanding, look, part, recoatable, sandable, strainable } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

const body = 'body.top body.back body.sides'
const runs = [look('Look for runs and dust', 10, 1)]
const sprayed = { placeKind: 'rail', checks: runs } as const

export const lacqueredInstrument: LibrarySchedule = {
  key: 'lacquered-instrument',
  name: 'Instrument body, sprayed lacquer in rounds',
  summary: 'Three rounds of three coats on the body with scuffing between days, weeks of hardening, levelling and buffing. The neck is oiled meanwhile; they meet at the setting up.',
  parts: [
    part('body', 'Body', 'neck pocket', { top: 'Top', back: 'Back', sides: 'Sides' }),
    part('neck', 'Neck', 'head', { back: 'Back of the neck' }, 'body'),
  ],
  steps: [
    flatSanding('sand-body', 'Sand the body', [5, 60, 15], body),
    coat('seal', 'Seal with shellac', 'shellac', [10, 8, 10], body, { perDay: 2, coatSize: 'thin', ground: 'porous', placeKind: 'rail' }),
    lightSanding('cut-sealer', 'Cut back the sealer', [5, 20, 10], body),
    coat('round-1', 'First round of lacquer', 'nitrocellulose-lacquer', [20, 8, 20], body, { ...sprayed, perDay: 3 }),
    lightSanding('scuff-1', 'Scuff and drop-fill', [5, 15, 10], body),
    coat('round-2', 'Second round of lacquer', 'nitrocellulose-lacquer', [20, 8, 20], body, { ...sprayed, perDay: 3 }),
    lightSanding('scuff-2', 'Scuff, second time', [5, 15, 10], body),
    coat('round-3', 'Third round of lacquer', 'nitrocellulose-lacquer', [20, 8, 20], body, { ...sprayed, perDay: 2 }),
    coat('flow', 'Thinned flow coat', 'nitrocellulose-lacquer', [20, 8, 20], body, { ...sprayed, coatSize: 'thin' }),
    levelling('level', 'Level wet by fine grades', [10, 120, 15], body, { dust: 'none', mayRunOver: true }),
    benchWork('buff', 'Buff', [10, 60, 15], body, { dust: 'some' }),
    flatSanding('sand-neck', 'Sand the neck', [5, 30, 10], 'neck.back'),
    coat('oil-neck', 'Oil the neck', 'tung-oil', [5, 8, 5], 'neck.back', { coatSize: 'thin', ground: 'porous', placeKind: 'hook', checks: [look('Wipe off what is left on top', 20, 3)] }),
    coat('oil-neck-2', 'Oil the neck again', 'tung-oil', [5, 8, 5], 'neck.back', { coatSize: 'thin', placeKind: 'hook', checks: [look('Wipe off what is left on top', 20, 3)] }),
    benchWork('assemble', 'Bolt on the neck, string and set up', [15, 120, 10], 'body neck', { mayRunOver: true }),
  ],
  links: [
    done('sand-body', 'seal'), sandable('seal', 'cut-sealer'), done('cut-sealer', 'round-1'), sandable('round-1', 'scuff-1'), done('scuff-1', 'round-2'), sandable('round-2', 'scuff-2'), done('scuff-2', 'round-3'),
    inWindow('round-3', 'flow'), recoatable('flow', 'level', 'cured'), done('level', 'buff'), done('buff', 'assemble'),
    done('sand-neck', 'oil-neck'), recoatable('oil-neck', 'oil-neck-2'), strainable('oil-neck-2', 'assemble', 'dry-to-handle'),
  ],
}
