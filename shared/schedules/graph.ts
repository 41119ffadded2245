import type { DraftPart, DraftStep, DraftTarget } from '#shared/schemas/schedule-draft'

interface Arrow { from: string, to: string }

/** What a step works on, face by face: a whole part stands for each of its faces, or for itself where it has none. */
export function surfacesOf(step: Pick<DraftStep, 'targets'>, parts: readonly DraftPart[]): string[] {
  const surfaces = step.targets.flatMap(({ part: key, face }: DraftTarget) => {
    if (face !== null) return [`${key}.${face}`]
    const faces = parts.find(part => part.key === key)?.faces ?? []
    return faces.length === 0 ? [`${key}.`] : faces.map(each => `${key}.${each.key}`)
  })
  return [...new Set(surfaces)]
}

/** Whether two steps work on one face. */
export function meet(a: Pick<DraftStep, 'targets'>, b: Pick<DraftStep, 'targets'>, parts: readonly DraftPart[]): boolean {
  const others = surfacesOf(b, parts)
  return surfacesOf(a, parts).some(surface => others.includes(surface))
}

/** Every step that cannot begin before `key` has, through any number of links. */
export function stepsAfter(links: readonly Arrow[], key: string): Set<string> {
  const found = new Set<string>()
  const open = [key]
  for (let at = open.pop(); at !== undefined; at = open.pop()) {
    for (const link of links) {
      if (link.from !== at || found.has(link.to)) continue
      found.add(link.to)
      open.push(link.to)
    }
  }
  return found
}

/** The steps of one circle of waits in their order, or null when nothing waits for itself. */
export function circleOf(keys: readonly string[], links: readonly Arrow[]): string[] | null {
  const start = keys.find(key => stepsAfter(links, key).has(key))
  if (start === undefined) return null
  const way = [start]
  for (let at = start; way.length <= keys.length;) {
    const next: Arrow | undefined = links.find(link => link.from === at && (link.to === start || (!way.includes(link.to) && stepsAfter(links, link.to).has(start))))
    if (!next || next.to === start) break
    way.push(next.to)
    at = next.to
  }
  return way
}

/** The steps that hang together with the first one, through links in either direction. */
export function connectedTo(first: string | undefined, links: readonly Arrow[]): Set<string> {
  const found = new Set(first === undefined ? [] : [first])
  for (let size = 0; size !== found.size;) {
    size = found.size
    for (const { from, to } of links) {
      if (found.has(from)) found.add(to)
      else if (found.has(to)) found.add(from)
    }
  }
  return found
}
