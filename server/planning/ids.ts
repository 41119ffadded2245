/** The names by which the planner knows turns and hands, and the way back to their rows. */
export const activityId = (turnId: number) => `t${turnId}`
export const turnIdOf = (activity: string) => Number(activity.slice(1))

export const handsId = (memberId: number) => `m${memberId}`
export const memberIdOf = (hand: string) => Number(hand.slice(1))
