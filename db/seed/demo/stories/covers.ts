import type { Calendar } from '~~/db/seed/demo/calendar'
import { correct, start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Ferry cover'
const longName = 'Ferry cover 4, the tall one for the reading room by the quay'

/** Six old lids made over into covers: grounded, dry enough to sand lightly. Their spine boards were laminated meanwhile. */
export function covers({ at }: Calendar): Told[] {
  const { say, coat, glue, work } = story(name)
  return [
    start({ at: at(-5, '9:00'), name, schedule: 'made-over-cover', pieces: [`${name} 1`, `${name} 2`, `${name} 3`, longName, `${name} 5`, `${name} 6`], place: 'shelfA', order: { name: 'Ferry logbooks', dueAt: at(14, '12:00') } }),
    work('wash', at(-5, '10:10'), { by: 'helper' }),
    work('key', at(-5, '11:30'), { by: 'second' }),
    say('moved', at(-5, '11:40'), { by: 'second', parts: ['cover'], place: 'rail' }),
    coat('size', at(-5, '12:30'), { by: 'second' }),
    glue('laminate', at(-5, '15:40'), { by: 'second', place: 'clamps' }),
    say('it is out', at(-2, '8:50'), { by: 'second', parts: ['spine'], place: 'shelfA' }),
    work('trim-spine', at(-2, '11:00'), { by: 'second' }),
    coat('ground-1', at(-2, '15:30'), { by: 'second' }),
    // The next step's key was pressed by mistake and taken back.
    coat('ground-2', at(-2, '15:36'), { by: 'second', pieces: [6], label: 'wrong key' }),
    correct({ at: at(-2, '15:41'), by: 'second', label: 'wrong key', takeBack: true }),
    say('touch test', at(-1, '8:45'), { by: 'helper', pieces: [3], body: { milestone: 'dry-to-sand-lightly', reached: false } }),
    say('not there', at(-1, '9:10'), { by: 'helper', pieces: [5], parts: ['cover'] }),
    say('seen', at(-1, '9:25'), { by: 'owner', pieces: [5], parts: ['cover'] }),
  ]
}
