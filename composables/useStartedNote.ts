/** The sentence a page leaves for the next one after a batch was started; null once somebody has put it away. */
export const useStartedNote = () => useState<string | null>('started note', () => null)
