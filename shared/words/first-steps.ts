import type { FirstStepKey } from '#shared/first-steps'

/** The first five minutes of a studio. */
export const firstStepWords: { title: string, says: string, asksOwner: string, done: string, steps: Record<FirstStepKey, { label: string, says: string, act: string, to: string }> } = {
  title: 'Five things, in any order',
  says: 'Each takes a minute, and all can be changed later.',
  asksOwner: 'Somebody who may change the studio sets it up: rooms and places first.',
  done: 'done',
  steps: {
    rooms: { label: 'Rooms', says: 'Heated or not, outdoors, where solvent is used: it decides how things dry there.', act: 'Add a room', to: '/settings/rooms' },
    places: { label: 'Places', says: 'Shelves, rails, clamps, with how many pieces each takes.', act: 'Add its places', to: '/settings/rooms' },
    hours: { label: 'Working hours', says: 'Monday to Friday, 9:00 to 17:00, until you say otherwise.', act: 'Look at the hours', to: '/settings/hours' },
    materials: { label: 'Materials you use', says: 'A starter library of usual figures is here. Where your tin says otherwise, the tin is right.', act: 'Look through them', to: '/materials' },
    batch: { label: 'The first batch', says: 'What is on the bench now: a finishing schedule, or none, and the names of the pieces.', act: 'Start a batch', to: '/start' },
  },
}
