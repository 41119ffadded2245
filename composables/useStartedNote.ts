/** What was started, for the next page: its sentence and its pieces; null once somebody has put it away. */
export const useStartedNote = () => useState<{ says: string, pieceIds: number[] } | null>('started note', () => null)
