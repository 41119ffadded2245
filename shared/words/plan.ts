/** Why a step has no time in the plan, or none that keeps its window. Each names what clashes. */
export const planWords = {
  tooFewHands: (step: string) => `“${step}” asks for more hands than there are.`,
  tooFewPlaces: (step: string, place: string) => `“${step}” asks for more ${place} than there are.`,
  noHours: (step: string) => `“${step}” takes longer than anybody who may do it works at a stretch.`,
  windowClosed: (step: string) => `The window for “${step}” meets no working hours: it will want its recovery.`,
  windowMissed: (step: string) => `“${step}” comes after its window has shut: nobody who may do it is free in time. It will want its recovery.`,
  windowPassed: (step: string) => `“${step}” comes after its window has shut. It will want its recovery.`,
  windowTaken: (step: string) => `In the window for “${step}” everybody who may do it is taken.`,
  noRoom: (step: string, place: string | null) => (place ? `“${step}” finds no free ${place}.` : `“${step}” finds no room for its rest.`),
  cycle: (step: string) => `“${step}” waits for something that waits for it.`,
  horizon: (step: string) => `“${step}” finds no time in the next 90 days.`,
  fixed: (step: string) => `The time given to “${step}” clashes with hours, places or what comes before it.`,
  after: (step: string, other: string) => `“${step}” waits for “${other}”, which has no time.`,
} as const
