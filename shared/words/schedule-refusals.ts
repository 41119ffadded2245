/** What a finishing schedule is refused with as a whole. */
export const scheduleRefusals = {
  changedMeanwhile: (by: string | null, no: number) => `${by ?? 'Somebody'} has saved edition ${no} meanwhile. Your draft is kept: look at what changed, then save on top of it or leave it.`,
  nameTaken: 'Another finishing schedule has this name. Give this one its own.',
  impossible: (count: number) => count === 1 ? 'The schedule cannot be as it stands.' : `The schedule cannot be as it stands, for ${count} reasons.`,
  unchanged: 'Nothing is different from the newest edition, so there is nothing to save.',
  nothingDone: 'Nothing was done to this piece yet that a schedule could be made of.',
} as const
