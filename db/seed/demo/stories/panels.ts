import type { Calendar } from '~~/db/seed/demo/calendar'
import { start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Dusk panel'

/** Two panels in French polish: the second coat on their backs is due and nobody has said whether it went on. */
export function panels({ at }: Calendar): Told[] {
  const { coat, work } = story(name)
  return [
    start({ at: at(-2, '8:45'), by: 'second', name, schedule: 'french-polished-panel', pieces: [`${name} 1`, `${name} 2`], place: 'cabinet', order: { name: 'Panels for the music cabinet', dueAt: at(12, '12:00') } }),
    work('sand', at(-2, '10:00'), { by: 'second' }),
    coat('wash', at(-2, '10:20'), { by: 'second' }),
    work('denib', at(-2, '12:40'), { by: 'second' }),
    coat('back', at(-1, '10:30'), { by: 'second' }),
  ]
}
