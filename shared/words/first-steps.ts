import type { FirstStepKey } from '#shared/first-steps'

/** The first five minutes of a studio. */
export const firstStepWords: { title: string, says: string, asksOwner: string, done: string, asItCame: string, back: string, steps: Record<FirstStepKey, { label: string, says: string, act: string, to: string }> } = {
  title: 'Five things, in any order',
  says: 'Each takes a minute, and all can be changed later.',
  asksOwner: 'Somebody who may change the studio sets it up: rooms and places first.',
  done: 'done',
  asItCame: 'as it came',
  back: 'Back to the first steps',
  steps: {
    rooms: { label: 'Rooms', says: 'Heated or not, outdoors, where solvent is used: it decides how things dry there.', act: 'Add a room', to: '/settings/rooms?first=1' },
    places: { label: 'Places', says: 'Shelves, rails, clamps in the room, with how many pieces each takes.', act: 'Add places', to: '/settings/rooms?first=1' },
    hours: { label: 'Working hours', says: 'Monday to Friday, 9:00 to 17:00 until you say otherwise. Nothing is planned outside them.', act: 'Look at the hours', to: '/settings/hours?first=1' },
    materials: { label: 'Materials you use', says: 'A starter library of usual figures is here. Where your tin says otherwise, the tin is right.', act: 'Look through them', to: '/materials?first=1' },
    batch: { label: 'The first batch', says: 'What is on the bench now: a finishing schedule, or none, and the names of the pieces.', act: 'Start a batch', to: '/start' },
  },
}
