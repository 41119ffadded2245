import { benchWork, done, glueUp, lightSanding, look, part, strainable } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

const blotters = [look('Change the blotters', 30, 3), look('Change the blotters again', 120, 3), look('Change the blotters, next morning', 960, 3)]

export const laminatedBoards: LibrarySchedule = {
  key: 'laminated-boards',
  name: 'Boards laminated under weight',
  summary: 'Two boards pasted together under weight with blotter changes, then lined on both faces so that they pull even. Labels are made meanwhile.',
  parts: [
    part('board', 'First board', 'edges'),
    part('second', 'Second board', null, {}, 'board'),
    part('facing', 'Facing paper', null, {}, 'board'),
    part('counter-lining', 'Counter-lining', null, {}, 'board'),
    part('label', 'Label', null, {}, 'board'),
  ],
  steps: [
    benchWork('cut', 'Cut boards, grain the same way', [10, 6, 5], 'board second', { dust: 'some' }),
    glueUp('laminate', 'Paste the boards together', 'paste', [10, 6, 5, 2], 'board second', { hold: 'weight', placeKind: 'bench', ground: 'porous', checks: blotters }),
    lightSanding('ease', 'Ease the edges', [5, 4, 5], 'board'),
    glueUp('face', 'Paste on the facing paper', 'paste', [10, 6, 5, 1], 'board facing', { hold: 'weight', placeKind: 'bench', ground: 'porous', checks: [look('Change the blotters', 30, 3)] }),
    glueUp('counter-line', 'Paste on the counter-lining', 'paste', [10, 6, 5, 2], 'board counter-lining', { hold: 'weight', placeKind: 'bench', ground: 'porous', checks: blotters }),
    benchWork('letter', 'Letter the labels', [10, 12, 5], 'label'),
    glueUp('label-on', 'Put the label on', 'pva-bookbinding', [5, 3, 5, 1], 'board label', { hold: 'weight', placeKind: 'bench', ground: 'porous' }),
    benchWork('trim', 'Trim to size and check for warp', [5, 5, 5], 'board'),
  ],
  links: [
    done('cut', 'laminate'), strainable('laminate', 'ease', 'full-strength'), done('ease', 'face'),
    // Lined on the other face before the first has dried, or the pair bows.
    done('face', 'counter-line'), strainable('counter-line', 'label-on', 'full-strength'), strainable('face', 'label-on', 'full-strength'), done('letter', 'label-on'), strainable('label-on', 'trim', 'full-strength'),
  ],
}
