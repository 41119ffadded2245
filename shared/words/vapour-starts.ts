import { cautionParts } from '#shared/library/caution-parts'
import type { VapourAnswers } from '#shared/schemas/act'
import { asSentence } from '#shared/words/verdict'

/** What is asked, said and refused when solvent work begins in a room. */
export const startVapour = {
  title: (room: string) => `Solvent work in ${room}`,
  intro: 'Three things first. Each wants an answer.',
  exhaust: 'Is the exhaust running?',
  exhaustAnswers: { running: 'It is running', none: 'There is none' },
  exhaustNone: 'Without an exhaust nobody can say how much vapour hangs there. You are asked every time.',
  flames: `Are ${cautionParts.ignition} off?`,
  nobodyElse: 'Is everybody else out of the room?',
  yes: 'Yes',
  no: 'No',
  phones: `${cautionParts.phonesOut} Record it when you come out: the time keys go back.`,
  putAway: 'Leave this device outside when you go in.',
  begin: 'Begin',
  record: 'Record it',
  leave: 'Not now',
  cautions: 'What to mind',
  told: 'Everybody is told.',
  ask: (rooms: string) => `Before solvent work in ${rooms}: is the exhaust running, are ${cautionParts.ignition} off, is everybody else out of the room? Answer all three.`,
  unanswered: 'Answer all three first.',
  flamesOn: `${cautionParts.flamesOut} Then say it again.`,
  somebodyThere: 'Wait till the others have left the room. Then say it again.',
  /** The same of work that lies behind: what was done is recorded with what is answered, whatever that is. */
  done: {
    intro: 'It is recorded with what you answer. Three things, and each wants an answer.',
    exhaust: 'Was the exhaust running?',
    exhaustAnswers: { running: 'It was running', none: 'There was none' },
    flames: `Were ${cautionParts.ignition} off?`,
    nobodyElse: 'Was everybody else out of the room?',
    ask: (rooms: string) => `Solvent work in ${rooms}: was the exhaust running, were ${cautionParts.ignition} off, was everybody else out of the room? Answer all three. It is recorded with what you answer.`,
    flamesOn: 'Vapour may still hang there. Let in air from outside, keep everybody out, and call for help if in doubt.',
    somebodyThere: 'Tell them what was in the air. Headache, dizzy or stinging eyes: out into the air, and a doctor if it does not pass.',
  },
  /** What was answered, as the history says it. */
  answered: ({ exhaust, flamesOff, nobodyElse }: VapourAnswers) => `It was said: ${exhaust === 'running' ? 'the exhaust running' : 'no exhaust'}, ${cautionParts.ignition} ${flamesOff ? 'off' : 'not all off'}, ${nobodyElse ? 'nobody else' : 'others'} in the room.`,
  tellAnew: 'That makes it solvent work, or puts it in another room, and three things are asked first. Take this act back and tell the work anew.',
  sleptIn: (room: string) => `Somebody sleeps in ${room}, or it shares its air with a bedroom. No solvent work and no wet solvent film in there. Choose another room.`,
  keepOut: (room: string, name: string) => name === '' ? `${room} is shut: keep out till an owner has opened it.` : `${room} is shut: keep out till ${name} or an owner has opened it.`,
  isocyanate: (material: string) => `${material} holds isocyanate. An owner must first state in writing how it is used here and what is worn. The page for air and fire takes it.`,
  noFan: `No fan on a solvent film in this room. ${cautionParts.fanSparks} Let the exhaust do it.`,
  warmRoom: `There is a wet solvent film in this room. ${cautionParts.noWarmAir} Let the exhaust do it.`,
  oldObject: (piece: string, why: string) => `${piece} is an old object: ${why}. ${asSentence(cautionParts.untested)} Let an expert test it first.`,
} as const
