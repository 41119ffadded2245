/** What a field of a new batch wants, said when it did not get it. */
export const fields = {
  batchName: 'Give the batch a name of 1 to 60 characters.',
  pieceName: 'Give every piece a name of 1 to 60 characters.',
  pieces: 'A batch has 1 to 60 pieces.',
  size: 'A piece takes 1 to 20 size units of a shelf.',
  area: 'The surface of a piece is more than 0 and at most 1000 m².',
  pieceList: 'Name the pieces by their numbers, with commas between: 3,4. At most 200.',
  partName: 'Give every part a name of 1 to 60 characters.',
  faceName: 'Give every face a name of 1 to 40 characters.',
  parts: 'A piece has 1 to 24 parts.',
  orderName: 'Give the order a name of 1 to 60 characters.',
} as const

export const batchRefusals = {
  noSchedule: 'Choose one of the studio’s finishing schedules.',
  noPlace: 'Choose a place for the pieces.',
  full: (place: string, free: number, wanted: number) => `${place} has room for ${free}; the batch needs ${wanted}. Choose another place or fewer pieces.`,
  sleptIn: (room: string) => `Somebody sleeps in ${room}. Work with solvents does not begin there.`,
  startTooOld: 'A batch begins at most 14 days back and 90 days ahead.',
  partsOfSchedule: 'The schedule says what parts there are. Leave them out, or choose no schedule.',
  sameParts: 'Two parts have the same name. Give each part its own.',
  sameFaces: (part: string) => `Two faces of ${part} have the same name. Give each face its own.`,
  sameNames: 'Two pieces have the same name. Give each its own.',
} as const

/** Why pieces cannot be of one batch. */
export const regroupRefusals = {
  one: 'Choose a batch for the pieces, or give a new one its name.',
  noBatch: 'This batch is not in this studio.',
  there: (batch: string) => `They are of ${batch} already.`,
  otherSchedule: (piece: string) => `${piece} goes by another schedule, or another edition of it. A batch has one.`,
  batchTaken: (name: string) => `Another batch is called ${name}. Give this one a name of its own, or put the pieces into that one.`,
  nameTaken: (name: string) => `Another piece of the batch is called ${name}. Give this one a name of its own.`,
  sameName: (piece: string) => `Two pieces would be called ${piece}. Give one of them another name first.`,
} as const

/** The one part of a piece that has no parts. */
export const wholePart = { key: 'whole', name: 'whole' } as const
