/** Moving a batch from the sheet of one of its pieces. */
export const moveWords = {
  title: (batch: string) => `Where does ${batch} go?`,
} as const
