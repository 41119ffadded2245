import type { Calendar } from '~~/db/seed/demo/calendar'
import { start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Reed lute'

/** Two bodies just sprayed: the spray room is shut until somebody opens it. Their necks hang by the stove, oiled. */
export function lutes({ at, desk }: Calendar): Told[] {
  const { coat, say, work, check } = story(name)
  return [
    start({ at: at(-7, '9:00'), by: 'owner', name, schedule: 'lacquered-instrument', pieces: [`${name} 1`, `${name} 2`], place: 'rack', order: { name: 'Lutes for the summer school', dueAt: at(40, '12:00') } }),
    work('sand-body', at(-7, '12:40'), { by: 'owner' }),
    coat('seal', at(-6, '9:40'), { by: 'owner' }),
    coat('seal', at(-6, '12:10'), { by: 'owner' }),
    work('cut-sealer', at(-5, '15:10'), { by: 'second' }),
    work('sand-neck', at(-2, '13:10'), { by: 'second' }),
    say('moved', at(-2, '13:20'), { by: 'second', parts: ['neck'], place: 'hooks' }),
    coat('oil-neck', at(-2, '14:20'), { by: 'second' }),
    check('oil-neck', at(-2, '14:42'), { by: 'second' }),
    { at: at(-2, '17:15'), play: player => player.rags('bench', 'second', at(-2, '17:15'), 'in water can') },
    say('moved', at(-1, '12:20'), { by: 'owner', parts: ['body'], place: 'booth' }),
    coat('round-1', desk(40), { by: 'owner' }),
    check('round-1', desk(29), { by: 'owner' }),
  ]
}
