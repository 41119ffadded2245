/** The page that stands in for any other while the studio cannot be reached. */
export const unreachedWords = {
  title: 'The studio is not reached',
  says: 'This page could not be fetched. What stood here before is not shown again: it would be old. Look at the pieces themselves.',
  /** @param count how many, or what stands for a number of several that only the page knows */
  taps: (count: number | string) => count === 0 ? 'No taps wait on this device.' : count === 1 ? 'One tap is kept on this device. It is told as soon as the studio is reached and a page is open.' : `${count} taps are kept on this device. They are told as soon as the studio is reached and a page is open.`,
  tried: (time: string) => `Last tried at ${time}. It tries again by itself.`,
  again: 'Try again now',
} as const
