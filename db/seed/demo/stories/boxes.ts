import type { Calendar } from '~~/db/seed/demo/calendar'
import { start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Hollow box'

/** Five boxes in clamps since half an hour ago, their painted lids on the shelf. */
export function boxes({ at, desk }: Calendar): Told[] {
  const { coat, glue, say } = story(name)
  return [
    start({ at: at(-1, '9:30'), name, schedule: 'painted-waxed-box', pieces: [1, 2, 3, 4, 5].map(no => `${name} ${no}`), place: 'shelfB', order: { name: 'Boxes for the tea room', dueAt: at(9, '10:00') } }),
    coat('lid-1', at(-1, '14:10')),
    glue('glue-box', desk(25), { place: 'clamps' }),
    say('seen', desk(20), { parts: ['lid'] }),
  ]
}
