import type { LibraryLink, LibraryMaterial, LibrarySchedule, LibraryStep, LibraryTarget } from '#shared/library/types'

/** Keys of steps in an order in which each comes after all it waits for, or null when they wait for each other. */
export function stepOrder(schedule: LibrarySchedule): string[] | null {
  const waiting = new Map(schedule.steps.map(step => [step.key, schedule.links.filter(link => link.to === step.key).map(link => link.from)]))
  const order: string[] = []
  while (waiting.size > 0) {
    const next = [...waiting].find(([, before]) => before.every(key => order.includes(key)))
    if (!next) return null
    order.push(next[0])
    waiting.delete(next[0])
  }
  return order
}

/** Every step that cannot begin before `key` has, through any number of links. */
export function stepsAfter(schedule: LibrarySchedule, key: string): Set<string> {
  const found = new Set<string>()
  const open = [key]
  for (let at = open.pop(); at !== undefined; at = open.pop()) {
    for (const link of schedule.links) {
      if (link.from !== at || found.has(link.to)) continue
      found.add(link.to)
      open.push(link.to)
    }
  }
  return found
}

function repeated(words: readonly string[], what: string): string[] {
  return words.filter((word, at) => words.indexOf(word) !== at).map(word => `${what} "${word}" is there twice`)
}

function partProblems(schedule: LibrarySchedule): string[] {
  const keys = schedule.parts.map(part => part.key)
  const into = new Map(schedule.parts.map(part => [part.key, part.into]))
  const problems = [...repeated(keys, 'part')]
  for (const part of schedule.parts) {
    problems.push(...repeated(part.faces.map(face => face.key), `face of ${part.key}`))
    if (part.into !== undefined && !keys.includes(part.into)) problems.push(`part "${part.key}" goes into "${part.into}", which is not a part`)
    let at = part.into
    for (let i = 0; at !== undefined && i < keys.length; i++) at = into.get(at)
    if (at !== undefined) problems.push(`part "${part.key}" goes into itself`)
  }
  return problems
}

function targetProblems(schedule: LibrarySchedule, step: LibraryStep): string[] {
  if (step.targets.length === 0) return [`step "${step.key}" touches no part`]
  return step.targets.flatMap((target) => {
    const part = schedule.parts.find(({ key }) => key === target.part)
    if (!part) return [`step "${step.key}" names the part "${target.part}", which is not there`]
    if (target.face !== undefined && !part.faces.some(({ key }) => key === target.face)) return [`step "${step.key}" names the face "${target.face}", which ${target.part} has not`]
    return []
  })
}

function stepProblems(schedule: LibrarySchedule, step: LibraryStep, materials: ReadonlyMap<string, LibraryMaterial>): string[] {
  const problems = targetProblems(schedule, step)
  const lays = step.kind === 'coat' || step.kind === 'glue-up'
  const material = step.material === undefined ? undefined : materials.get(step.material)
  if (step.material !== undefined && !material) problems.push(`step "${step.key}" asks for the material "${step.material}", which is not there`)
  if (lays && step.material === undefined) problems.push(`step "${step.key}" lays nothing`)
  if (!lays && step.material !== undefined) problems.push(`step "${step.key}" names a material but lays none`)
  if (step.kind === 'glue-up' && (step.targets.length < 2 || step.targets.some(target => target.face !== undefined))) problems.push(`step "${step.key}" joins fewer than two parts, or a face`)
  if (step.hold !== undefined && step.kind !== 'glue-up') problems.push(`step "${step.key}" is held but glues nothing`)
  if (step.hold !== undefined && step.releaseMin === 0) problems.push(`step "${step.key}" is held and nobody takes it out`)
  if (step.pieceMin <= 0 || step.perDay < 1 || step.days < 1) problems.push(`step "${step.key}" has no minutes or no coats`)
  if (step.checks.some((check, at) => check.afterMin <= (step.checks[at - 1]?.afterMin ?? 0))) problems.push(`the checks of step "${step.key}" are out of order`)
  return problems
}

function linkProblems(schedule: LibrarySchedule, link: LibraryLink, materials: ReadonlyMap<string, LibraryMaterial>): string[] {
  const name = `link ${link.from} -> ${link.to}`
  const from = schedule.steps.find(({ key }) => key === link.from)
  if (!from || !schedule.steps.some(({ key }) => key === link.to)) return [`${name}: a step is not there`]
  const material = materials.get(from.material ?? '')
  const problems: string[] = []
  if (link.milestone !== null && !material?.milestones.some(rung => rung.name === link.milestone)) problems.push(`${name}: ${from.material ?? 'no material'} has no "${link.milestone}"`)
  if (link.windowed && !material?.windows.length) problems.push(`${name}: ${from.material ?? 'no material'} has no window`)
  return problems
}

const meets = (a: LibraryTarget, b: LibraryTarget) => a.part === b.part && (a.face === undefined || b.face === undefined || a.face === b.face)

/** Two steps on one face with nothing to say which comes first. */
function orderProblems(schedule: LibrarySchedule): string[] {
  const after = new Map(schedule.steps.map(step => [step.key, stepsAfter(schedule, step.key)]))
  return schedule.steps.flatMap((a, at) => schedule.steps.slice(at + 1).flatMap((b) => {
    const shared = a.targets.some(one => b.targets.some(other => meets(one, other)))
    const told = after.get(a.key)?.has(b.key) || after.get(b.key)?.has(a.key)
    return shared && !told ? [`steps "${a.key}" and "${b.key}" are on the same part in no order`] : []
  }))
}

/** The steps that hang together with the first one, through links in either direction. */
function connected(schedule: LibrarySchedule): Set<string> {
  const found = new Set<string>(schedule.steps.slice(0, 1).map(step => step.key))
  for (let size = 0; size !== found.size;) {
    size = found.size
    for (const { from, to } of schedule.links) {
      if (found.has(from)) found.add(to)
      else if (found.has(to)) found.add(from)
    }
  }
  return found
}

/**
 * What is wrong with a finishing schedule, in sentences that name the step, part or link; an empty list when nothing is.
 * `materials` are those it may ask for.
 */
export function scheduleProblems(schedule: LibrarySchedule, materials: readonly LibraryMaterial[]): string[] {
  const byKey = new Map(materials.map(material => [material.key, material]))
  const together = connected(schedule)
  return [
    ...(schedule.steps.length === 0 ? ['there is no step'] : []),
    ...partProblems(schedule),
    ...repeated(schedule.steps.map(step => step.key), 'step'),
    ...schedule.steps.flatMap(step => stepProblems(schedule, step, byKey)),
    ...repeated(schedule.links.map(link => `${link.from} -> ${link.to}`), 'link'),
    ...schedule.links.flatMap(link => linkProblems(schedule, link, byKey)),
    ...(stepOrder(schedule) ? [] : ['some steps wait for each other']),
    ...schedule.steps.filter(step => !together.has(step.key)).map(step => `step "${step.key}" is not linked to the rest`),
    ...orderProblems(schedule),
  ]
}
