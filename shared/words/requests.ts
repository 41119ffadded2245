/** What is said when a request did not get through. */
export const requests = {
  notReached: 'The studio cannot be reached. What you typed is still here: try again in a moment.',
  failed: 'That did not work. What you typed is still here.',
} as const
