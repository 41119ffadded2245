/** What a refused request is told. Each says what stands in the way, and never blames. */
export const refusals = {
  notSignedIn: 'Sign in first.',
  notAllowed: 'Your role in this studio does not include this. Ask an owner.',
  noStudio: 'Choose a studio first.',
  absent: 'There is nothing here by that number.',
  foreignOrigin: 'This request came from another site and was not carried out.',
  tooMany: 'Too many tries. Wait a few minutes, then try again.',
  malformed: 'Some of this could not be read. See the marked fields.',
  notFields: 'The body of the request must be JSON or form fields.',
  unexpected: (requestId: string) => `Something went wrong here and has been noted as ${requestId}. Nothing you typed is lost.`,
} as const
