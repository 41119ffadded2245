import type { Calendar } from '~~/db/seed/demo/calendar'
import { start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Moss board'

/** Three lined boards, finished and fetched before today. */
export function boards({ at }: Calendar): Told[] {
  const { glue, say, work, check } = story(name)
  return [
    start({ at: at(-16, '9:10'), by: 'second', name, schedule: 'laminated-boards', pieces: [1, 2, 3].map(no => `${name} ${no}`), place: 'bench', order: { name: 'Boards for the map room', dueAt: at(-2, '12:00') } }),
    work('cut', at(-16, '10:00'), { by: 'second' }),
    glue('laminate', at(-16, '10:40'), { by: 'second' }),
    check('laminate', at(-16, '11:12'), { by: 'second' }),
    check('laminate', at(-16, '12:45'), { by: 'second' }),
    check('laminate', at(-15, '8:50'), { by: 'second' }),
    say('it is out', at(-13, '9:00'), { by: 'second', parts: ['board'] }),
    work('ease', at(-13, '9:30'), { by: 'helper' }),
    glue('face', at(-13, '10:20'), { by: 'second' }),
    glue('counter-line', at(-13, '10:50'), { by: 'second' }),
    check('counter-line', at(-13, '11:25'), { by: 'second' }),
    work('letter', at(-12, '15:00'), { by: 'helper' }),
    say('it is out', at(-9, '9:05'), { by: 'second', parts: ['board'] }),
    say('it is out', at(-9, '9:06'), { by: 'second', parts: ['board'] }),
    glue('label-on', at(-9, '10:00'), { by: 'second' }),
    say('it is out', at(-7, '9:00'), { by: 'second', parts: ['board'] }),
    work('trim', at(-7, '9:40'), { by: 'second' }),
    say('gone', at(-2, '11:30'), { by: 'owner' }),
  ]
}
