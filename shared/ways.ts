/** Pages that are reached from one of the ways and have an address of their own. */
const under: Readonly<Record<string, string>> = { '/arrange': '/board', '/walk-round': '/hands' }

/**
 * How a way is told to be the current one: the page itself, the one a page belongs to ("/materials" on "/materials/4"), or neither.
 * @param to the way's address, without a slash at its end
 */
export function wayCurrent(path: string, to: string): 'page' | 'true' | undefined {
  const at = path.length > 1 ? path.replace(/\/$/, '') : path
  if (at === to) return 'page'
  return at.startsWith(`${to}/`) || under[at] === to ? 'true' : undefined
}
