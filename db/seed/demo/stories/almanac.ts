import type { Calendar } from '~~/db/seed/demo/calendar'
import { start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'
import type { CoatSize } from '#shared/terms'

const name = 'Almanac'
const minute = 60_000

/**
 * Four sewn books, cased in and decorated, just varnished the first time. On the third the varnish ran.
 * @param varnish when the first varnish was on, ms UTC, and how thick
 */
export function almanac({ at }: Calendar, varnish: { at: number, size: CoatSize }): Told[] {
  const { say, coat, glue, work, check } = story(name)
  return [
    start({ at: at(-16, '9:00'), name, schedule: 'cased-book', pieces: ['Almanac 1', 'Almanac 2', 'Almanac 3', 'Almanac 4'], place: 'bench', order: { name: 'Almanacs for the winter fair', dueAt: at(5, '12:00') } }),
    work('cut-boards', at(-16, '10:10')),
    glue('cover-case', at(-16, '11:30'), { place: 'press' }),
    check('cover-case', at(-16, '12:32'), { by: 'second' }),
    work('fold', at(-16, '15:10'), { by: 'second' }),
    say('it is out', at(-15, '12:05'), { parts: ['case'], place: 'rail' }),
    work('sew', at(-15, '15:40'), { by: 'second' }),
    glue('line-spine', at(-15, '16:30'), { by: 'second', place: 'press' }),
    say('it is out', at(-14, '16:35'), { by: 'second', parts: ['block'], place: 'bench' }),
    work('trim', at(-13, '9:40'), { by: 'second' }),
    coat('size', at(-13, '10:20')),
    coat('ground-1', at(-12, '10:40')),
    work('sand-1', at(-9, '9:20'), { by: 'helper' }),
    coat('ground-2', at(-9, '10:40')),
    work('sand-2', at(-8, '9:30'), { by: 'helper' }),
    coat('colour', at(-8, '10:50')),
    coat('colour', at(-8, '14:20')),
    say('touch test', at(-6, '8:50'), { body: { milestone: 'dry-to-sand-flat', reached: false } }),
    say('touch test', at(-6, '14:10'), { body: { milestone: 'dry-to-sand-flat', reached: true } }),
    glue('case-in', at(-6, '15:30'), { place: 'press' }),
    check('case-in', at(-6, '16:31'), { by: 'second' }),
    say('it is out', at(-5, '16:10'), { place: 'shelfA' }),
    work('open-joints', at(-5, '16:35')),
    coat('decoration', at(-2, '11:40')),
    coat('varnish-1', varnish.at, { body: { size: varnish.size } }),
    check('varnish-1', varnish.at + 11 * minute),
    say('dropped out', varnish.at + 14 * minute, { pieces: [3], body: { step: 'varnish-1' } }),
  ]
}
