import type { Calendar } from '~~/db/seed/demo/calendar'
import { start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Brine bowl'

/** Three bowls flooded with oil a little over an hour ago: the rags of it lie somewhere still. */
export function bowls({ at, desk }: Calendar): Told[] {
  const { coat, work, check } = story(name)
  return [
    start({ at: at(-1, '9:00'), by: 'second', name, schedule: 'oiled-bowl', pieces: [1, 2, 3].map(no => `${name} ${no}`), place: 'shelfB' }),
    work('sand', at(-1, '11:20'), { by: 'second' }),
    coat('feed', desk(70), { by: 'second' }),
    check('feed', desk(52), { by: 'second' }),
  ]
}
