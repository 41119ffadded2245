/** Degrees a surface must stay above the dew point for a coat to go on, or to stay on while wet, a coating inspector's rule. */
export const dewMarginC = 3
