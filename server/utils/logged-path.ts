/** A request's path as a log may show it: what stands for a secret in it is left out. */
export const loggedPath = (path: string): string => path.replace(/([?&]wall=|\/wall\/|\/calendar\/|\/sensor\/|\/reset\/|\/join\/)[^/&?]+/, '$1…')
