import type { Calendar } from '~~/db/seed/demo/calendar'
import { start, story } from '~~/db/seed/demo/play'
import type { Told } from '~~/db/seed/demo/play'

const name = 'Orchard dresser'

/** An old dresser in parts: the carcase was varnished in the workshop and chilled in the night, drawers and two-faced doors dry in the warm. */
export function dresser({ at, desk }: Calendar): Told[] {
  const { coat, say, work, turn } = story(name)
  return [
    start({ at: at(-9, '9:30'), by: 'owner', name, schedule: 'painted-dresser', pieces: [name], place: 'floor', oldObject: true, order: { name: 'Dresser for the mill kitchen', dueAt: at(8, '17:00') } }),
    say('intake answered', at(-9, '9:50'), { by: 'owner', body: { question: 'lead', answer: 'tested, none' } }),
    say('intake answered', at(-9, '9:52'), { by: 'owner', body: { question: 'mould', answer: 'tested, none' } }),
    say('intake answered', at(-9, '9:53'), { by: 'owner', body: { question: 'green cloth', answer: 'tested, none' } }),
    say('intake answered', at(-9, '9:54'), { by: 'owner', body: { question: 'metal coating', answer: 'tested, none' } }),
    work('strip-hardware', at(-9, '11:00'), { by: 'helper' }),
    work('wash', at(-9, '14:10'), { by: 'helper' }),
    say('moved', at(-9, '14:30'), { by: 'maker', parts: ['doors'], place: 'rack' }),
    say('moved', at(-9, '14:32'), { by: 'maker', parts: ['drawers', 'hardware'], place: 'shelfB' }),
    work('key', at(-8, '10:40')),
    coat('carcase-seal', at(-8, '14:00')),
    coat('drawers-seal', at(-8, '15:00')),
    coat('doors-seal', at(-8, '15:20')),
    coat('carcase-1', at(-7, '10:20')),
    coat('drawers-paint', at(-7, '11:00')),
    coat('doors-back', at(-7, '11:30')),
    coat('drawers-paint', at(-7, '14:40')),
    coat('doors-back', at(-7, '15:10')),
    work('carcase-rub', at(-6, '9:30'), { by: 'helper' }),
    coat('carcase-2', at(-6, '10:40')),
    coat('doors-back-varnish', at(-5, '13:30')),
    work('clean-hardware', at(-5, '15:00'), { by: 'helper' }),
    turn('turn-doors', at(-1, '9:20'), { by: 'helper' }),
    coat('doors-front-seal', at(-1, '9:50')),
    coat('doors-front', at(-1, '12:10')),
    coat('doors-front', desk(33), { by: 'second' }),
    coat('carcase-varnish', at(-1, '17:05')),
    say('moved', at(-1, '17:15'), { parts: ['hardware'], place: 'bench' }),
  ]
}
