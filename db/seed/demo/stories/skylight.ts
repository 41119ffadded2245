import type { Calendar } from '~~/db/seed/demo/calendar'
import { correct, start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Skylight frame'
const minute = 60_000

/**
 * Four mitred frames, oiled twice.
 * @param oiledAt when the second wipe of oil varnish was on, ms UTC
 */
export function skylight({ at }: Calendar, oiledAt: number): Told[] {
  const { say, coat, glue, work, check } = story(name)
  return [
    start({ at: at(-9, '9:20'), by: 'owner', name, schedule: 'mitred-frame', pieces: [1, 2, 3, 4].map(no => `${name} ${no}`), place: 'rack', order: { name: 'Frames for the print room', dueAt: at(7, '16:00') } }),
    work('cut', at(-9, '12:10'), { by: 'owner' }),
    glue('glue-up', at(-9, '14:00'), { by: 'owner', place: 'clamps' }),
    check('glue-up', at(-9, '14:06'), { by: 'owner' }),
    say('it is out', at(-9, '16:20'), { by: 'owner', parts: ['rails'], place: 'bench' }),
    work('slot', at(-7, '10:15'), { by: 'owner' }),
    work('make-keys', at(-7, '11:20'), { by: 'owner' }),
    glue('glue-keys', at(-7, '13:50'), { by: 'owner', place: 'clamps' }),
    say('it is out', at(-7, '16:00'), { by: 'owner', parts: ['rails'], place: 'bench' }),
    work('flush', at(-5, '10:30'), { by: 'owner' }),
    // Told too late the first time and put right the same morning.
    coat('oil-1', at(-5, '11:45'), { by: 'owner', label: 'frames oiled' }),
    correct({ at: at(-5, '12:05'), by: 'owner', label: 'frames oiled', doneAt: at(-5, '11:20') }),
    check('oil-1', at(-5, '11:50'), { by: 'owner' }),
    say('moved', at(-5, '12:10'), { by: 'owner', parts: ['rails'], place: 'rack' }),
    work('glass', at(-5, '15:20'), { by: 'owner' }),
    { at: at(-5, '17:20'), play: player => player.rags('bench', 'owner', at(-5, '17:20'), 'flat outdoors') },
    work('scuff', oiledAt - 45 * minute, { by: 'owner' }),
    coat('oil-2', oiledAt, { by: 'owner' }),
    check('oil-2', oiledAt + 17 * minute, { by: 'owner' }),
    { at: oiledAt + 90 * minute, play: player => player.rags('bench', 'owner', oiledAt + 90 * minute, 'in water can') },
  ]
}
