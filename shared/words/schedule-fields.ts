/** What the fields of a finishing schedule want, said when they did not get it. */
export const draftFields = {
  key: 'A key is small letters, figures and hyphens, at most 40.',
  name: 'The name of a schedule has at most 80 characters.',
  summary: 'What it is for has at most 400 characters.',
  partName: 'The name of a part has at most 60 characters.',
  grip: 'Where to hold it has at most 40 characters.',
  faceName: 'The name of a face has at most 40 characters.',
  stepName: 'The name of a step has at most 80 characters.',
  checkName: 'The name of a check has at most 80 characters.',
  kind: 'Choose the kind of step.',
  size: 'A coat is thin, normal, full or flood.',
  ground: 'The ground is porous, primed, sealed or non-absorbent.',
  hold: 'It is held in clamps, in the press or under weight, or not at all.',
  place: 'Choose a kind of place, or leave it open.',
  perDay: 'Coats a day are a whole number from 1 to 24.',
  days: 'Days are a whole number from 1 to 60.',
  minutes: 'Minutes are a whole number from 0 to 1440.',
  afterMin: 'A check comes between 1 minute and 30 days after the work.',
  hands: 'Pairs of hands are a whole number from 0 to 20.',
  dust: 'Dust is none, some or much.',
  targets: 'A step works on at most 60 faces.',
  checks: 'A rest has at most 12 checks.',
  recovery: 'The name of a recovery has at most 80 characters.',
  milestone: 'Choose what is waited for.',
  risk: 'Waits go by likely, by give-it-till or by the slowest.',
  faces: 'A part has at most 12 faces.',
  parts: 'A schedule has at most 24 parts.',
  steps: 'A schedule has at most 80 steps.',
  links: 'A schedule has at most 300 waits.',
} as const

/** "Times a day: a whole number from 1 to 24." */
export const wholeFromTo = (field: string, least: number, most: number) => `${field}: a whole number from ${least} to ${most}.`
