import type { MoveCause, MovedTurn } from '#shared/plan-moves'
import type { PlaceKind } from '#shared/terms'
import { clockTime, roughTime } from '#shared/time'
import type { Clock } from '#shared/time'
import { temperatureText } from '#shared/units'
import type { Units } from '#shared/units'
import { groupNames } from '#shared/words/group'
import { stepNoun, titled } from '#shared/words/steps'
import { asSentence } from '#shared/words/verdict'

export const moveWords = {
  title: 'What moved',
  more: (count: number) => count === 1 ? 'One more that moved' : `${count} more that moved`,
  threshold: 'Told from half an hour on for the next day, four hours for the week, a day beyond.',
} as const

const places: Record<PlaceKind, string> = {
  'shelf': 'the shelves are full', 'rail': 'the rails are full', 'hook': 'every hook is taken', 'turntable': 'every turntable is taken', 'rack': 'the racks are full', 'clamps': 'all clamps are in use',
  'press': 'the press is in use', 'bench': 'the benches are full', 'booth': 'the booth is in use', 'drying cabinet': 'the drying cabinet is full', 'floor': 'the floor is full',
}

/** Under a swatch, for a while: from when to when its next turn has moved. */
export const wasText = ({ wasAt, isAt }: Pick<MovedTurn, 'wasAt' | 'isAt'>, clock: Clock) => `moved from ${clockTime(wasAt, clock)} to ${clockTime(isAt, clock)}`

/** Beside a planned start: from when it has moved, and why. */
export const movedWhy = ({ wasAt, why }: Pick<MovedTurn, 'wasAt' | 'why'>, clock: Clock, units: Units) => asSentence(`moved from ${clockTime(wasAt, clock)}: ${causeText(why, clock, units)}`)

/** The time of a start that has been moved, told in full: "15:40", "Wed 9:00". */
const at = (instant: number, clock: Clock) => clockTime(instant, clock)

function filmText({ step, readyAt, room, tempC }: Extract<MoveCause, { code: 'film later' | 'film sooner' }>, clock: Clock, units: Units): string {
  const air = room !== null && tempC !== null ? `${room} falls to ${temperatureText(tempC, units)}, and ` : ''
  return `${air}${titled(step)} is not dry enough before ${roughTime(readyAt, clock, 'up')}`
}

/** Why a turn lies elsewhere, to stand behind a colon. */
export function causeText(why: MoveCause, clock: Clock, units: Units): string {
  switch (why.code) {
    case 'pinned': return why.by === null ? 'it was pinned there' : `${why.by} pinned it there`
    case 'window missed': return 'it misses its window, and its recovery comes first'
    case 'recovery': return `a window was missed, and ${titled(why.step)} comes first`
    case 'shut room': return `${why.room} stands shut until somebody opens it`
    case 'film later': return filmText(why, clock, units)
    case 'film sooner': return `${titled(why.step)} lets it begin sooner, from ${roughTime(why.readyAt, clock, 'up')}`
    case 'not told': return `nobody has said whether ${titled(why.step)} was done, due ${at(why.dueAt, clock)}`
    case 'follows': return `it follows ${titled(why.step)}, now at ${at(why.startsAt, clock)}${why.because === null ? '' : `; that moved because ${causeText(why.because, clock, units)}`}`
    case 'step added': return `${titled(why.step)} was put in before it`
    case 'hours': return why.name === null ? 'nobody who may do it works at the old time' : `${why.name} does not work at the old time`
    case 'not theirs': return `${why.name} does not do such work any more`
    case 'hands': return `${why.name ?? 'everybody who may do it'} is at ${titled(why.step)} of ${why.added ? 'the new batch ' : ''}${why.batch} then${why.name === null ? ' or at other work' : ''}${why.because ? `; that moved because ${causeText(why.because, clock, units)}` : ''}`
    case 'opened': return `${why.name ?? 'somebody who may do it'} works then now`
    case 'freed': return `${why.name ?? 'somebody'} is free then, since ${titled(why.step)} of ${why.batch} ${why.gone === 'done' ? 'is done' : why.gone === 'dropped' ? 'is no longer to be done' : 'lies elsewhere now'}`
    case 'done before': return `${titled(why.step)} before it is done already`
    case 'place': return `${places[why.kind]} then`
    case 'dust': return why.step === null ? 'a film in the room is not free of dust before' : `dust and wet film do not go together: ${titled(why.step)} is then`
    case 'vapour': return `vapour keeps it apart from ${titled(why.step)}`
    case 'ended': return `${endedText(why.because)}; the plan has kept the new time`
    case 'fits better': return 'it fits better now'
  }
}

/** A reason that held when something moved and has gone since. */
function endedText(why: MoveCause): string {
  switch (why.code) {
    case 'hours': return why.name === null ? 'nobody who may do it worked at the old time, which has changed since' : `${why.name} did not work at the old time, which has changed since`
    case 'not theirs': return `${why.name} did not do such work for a time`
    case 'shut room': return `${why.room} stood shut, and is open again`
    case 'pinned': return why.by === null ? 'it was pinned there, and the pin is gone' : `${why.by} had pinned it there, and the pin is gone`
    default: return 'the reason for it has gone'
  }
}

/** "“Third coat” of Lantern box 2 moves from 15:40 to Wed 9:00: the Shed falls to 8 °C, and “Second coat” is not dry enough before Wed 8:45." */
export function moveText(moves: readonly MovedTurn[], clock: Clock, units: Units): string {
  const [first] = moves
  if (!first) return ''
  const what = asSentence(stepNoun(first.stepKind, first.step)).slice(0, -1)
  return `${what} of ${groupNames(moves.map(move => move.piece))} moves from ${at(first.wasAt, clock)} to ${at(first.isAt, clock)}: ${causeText(first.why, clock, units)}.`
}
