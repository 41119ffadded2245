import type { MoveCause } from '#shared/plan-moves'

/** Every cause of a move that names a step. */
export function moveCauses(step: string, at: number): MoveCause[] {
  return [
    { code: 'recovery', step }, { code: 'film later', step, readyAt: at, room: 'Shed', tempC: 8 }, { code: 'film sooner', step, readyAt: at, room: null, tempC: null },
    { code: 'not told', step, dueAt: at }, { code: 'follows', step, startsAt: at, because: null }, { code: 'step added', step }, { code: 'hands', name: null, step, batch: 'Lutes', added: true },
    { code: 'opened', name: null }, { code: 'opened', name: 'Oda' }, { code: 'freed', name: null, step, batch: 'Lutes' }, { code: 'freed', name: 'Oda', step, batch: 'Lutes', gone: 'done' }, { code: 'freed', name: null, step, batch: 'Lutes', gone: 'dropped' }, { code: 'done before', step }, { code: 'dust', step }, { code: 'vapour', step },
  ]
}
