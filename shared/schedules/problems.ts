import { walkSchedule } from '#shared/schedule-walk'
import type { SystemRuleWire } from '#shared/schemas/schedule'
import type { DraftLink, DraftStep, ScheduleDraft } from '#shared/schemas/schedule-draft'
import { circleOf, connectedTo, meet, stepsAfter, surfacesOf } from '#shared/schedules/graph'
import { milestonesAfter, sheetOf } from '#shared/schedules/link'
import { leavesFilm } from '#shared/step-kinds'
import type { Sheets } from '#shared/schedules/link'
import type { Reckoned } from '#shared/schedules/reckon'

export type ScheduleProblemCode =
  | 'no name' | 'no step' | 'no part' | 'part unnamed' | 'part twice' | 'face unnamed' | 'face twice' | 'key twice'
  | 'step unnamed' | 'touches nothing' | 'no such part' | 'no such face' | 'lays nothing' | 'no such material' | 'lays none' | 'joins one'
  | 'held for nothing' | 'nobody takes it out' | 'no minutes' | 'check unnamed' | 'checks out of order'
  | 'no such step' | 'wait twice' | 'waits for itself' | 'nothing dries' | 'no such milestone' | 'no window' | 'window shuts first' | 'recovery unnamed'
  | 'circle' | 'apart' | 'no order' | 'never over' | 'too soon over' | 'no end' | 'window narrow' | 'round too tight' | 'open too short'

/**
 * Something that cannot be (`refused`) or that a maker should know (`caution`). `step` and `other` are keys of the steps it
 * is about, the one to change first; `what` is a word to be shown: a milestone, a face, a material; `minutes` what it is about.
 */
export interface ScheduleProblem { code: ScheduleProblemCode, kind: 'refused' | 'caution', step: string | null, other: string | null, what: string | null, minutes: number | null, steps: string[] }

/** What a draft only has not got yet, as every new one: to be done, not to be mended. */
const missing: readonly ScheduleProblemCode[] = ['no name', 'no step', 'no part']
export const isMissing = ({ code }: Pick<ScheduleProblem, 'code'>) => missing.includes(code)

type Found = Partial<Omit<ScheduleProblem, 'code' | 'kind'>>
const refused = (code: ScheduleProblemCode, found: Found = {}): ScheduleProblem => ({ code, kind: 'refused', step: null, other: null, what: null, minutes: null, steps: [], ...found })
const caution = (code: ScheduleProblemCode, found: Found): ScheduleProblem => ({ ...refused(code, found), kind: 'caution' })

const twice = (words: readonly string[]) => words.filter((word, at) => word !== '' && words.indexOf(word) !== at)

function partProblems({ parts, steps }: ScheduleDraft): ScheduleProblem[] {
  return [
    ...parts.length === 0 ? [refused('no part')] : [],
    ...parts.some(part => part.name === '') ? [refused('part unnamed')] : [],
    ...twice(parts.map(part => part.name)).map(what => refused('part twice', { what })),
    ...parts.filter(part => part.faces.some(face => face.name === '')).map(part => refused('face unnamed', { what: part.name })),
    ...parts.flatMap(part => twice(part.faces.map(face => face.name)).map(what => refused('face twice', { what: `${what}, ${part.name}` }))),
    ...[...twice(parts.map(part => part.key)), ...twice(steps.map(step => step.key)), ...parts.flatMap(part => twice(part.faces.map(face => face.key)))].map(what => refused('key twice', { what })),
  ]
}

function targetProblems({ parts }: ScheduleDraft, step: DraftStep): ScheduleProblem[] {
  if (step.targets.length === 0) return [refused('touches nothing', { step: step.key })]
  return step.targets.flatMap((target) => {
    const part = parts.find(each => each.key === target.part)
    if (!part) return [refused('no such part', { step: step.key, what: target.part })]
    return target.face === null || part.faces.some(face => face.key === target.face) ? [] : [refused('no such face', { step: step.key, what: target.face })]
  })
}

function stepProblems(draft: ScheduleDraft, step: DraftStep, sheets: Sheets): ScheduleProblem[] {
  const lays = leavesFilm(step.kind)
  const at = { step: step.key }
  const material = step.materialId === null ? undefined : sheets.get(step.materialId)
  return [
    ...step.name === '' ? [refused('step unnamed', at)] : [],
    ...targetProblems(draft, step),
    ...lays && step.materialId === null ? [refused('lays nothing', at)] : [],
    ...step.materialId !== null && !material ? [refused('no such material', at)] : [],
    ...!lays && step.materialId !== null ? [refused('lays none', { ...at, what: material?.name ?? null })] : [],
    ...step.kind === 'glue-up' && (new Set(step.targets.map(target => target.part)).size < 2 || step.targets.some(target => target.face !== null)) ? [refused('joins one', at)] : [],
    ...step.hold !== null && step.kind !== 'glue-up' ? [refused('held for nothing', at)] : [],
    ...step.hold !== null && step.releaseMin === 0 ? [refused('nobody takes it out', at)] : [],
    ...step.pieceMin <= 0 ? [refused('no minutes', at)] : [],
    ...step.checks.some(check => check.name === '') ? [refused('check unnamed', at)] : [],
    ...step.checks.some((check, index) => check.afterMin <= (step.checks[index - 1]?.afterMin ?? 0)) ? [refused('checks out of order', at)] : [],
  ]
}

function linkProblems(draft: ScheduleDraft, link: DraftLink, sheets: Sheets): ScheduleProblem[] {
  const from = draft.steps.find(step => step.key === link.from)
  const to = draft.steps.find(step => step.key === link.to)
  if (!from || !to) return [refused('no such step', { step: to?.key ?? from?.key ?? null, what: from ? link.to : link.from })]
  const at = { step: to.key, other: from.key }
  if (from === to) return [refused('waits for itself', { step: to.key })]
  const sheet = sheetOf(from, sheets)
  if (!sheet) return link.milestone !== null || link.windowed ? [refused('nothing dries', at)] : []
  return [
    ...link.milestone !== null && !milestonesAfter(from, sheets).includes(link.milestone) ? [refused('no such milestone', { ...at, what: link.milestone })] : [],
    ...link.recovery !== null && link.recovery.name === '' ? [refused('recovery unnamed', at)] : [],
    ...link.windowed && sheet.drying.windows.length === 0 ? [refused('no window', { ...at, what: sheet.name })] : [],
  ]
}

/**
 * Waits that are missing between steps on one face, each once: a wait that would also put others in order, which come before and after it, is said of
 * the two steps it belongs between, and `steps` names those others in the order of the list.
 */
function orderProblems({ steps, links, parts }: ScheduleDraft): ScheduleProblem[] {
  const after = new Map(steps.map(step => [step.key, stepsAfter(links, step.key)]))
  const follows = (a: string, b: string) => after.get(a)?.has(b) ?? false
  const open = steps.flatMap((a, at) => steps.slice(at + 1).filter(b => !follows(a.key, b.key) && !follows(b.key, a.key) && meet(a, b, parts)).map(b => ({ a: a.key, b: b.key })))
  const within = (wide: typeof open[number], near: typeof open[number]) => wide !== near && (wide.a === near.a || follows(wide.a, near.a)) && (wide.b === near.b || follows(near.b, wide.b))
  return open.filter(near => !open.some(other => within(near, other))).map((near) => {
    const touched = new Set(open.filter(wide => within(wide, near)).flatMap(({ a, b }) => [a, b]))
    return refused('no order', { step: near.b, other: near.a, steps: steps.map(step => step.key).filter(key => touched.has(key) && key !== near.a && key !== near.b) })
  })
}

/** Steps that hang together with nothing of the rest, each heap of them once, where no missing wait already said would tie them. */
function apartProblems({ steps, links }: ScheduleDraft, order: readonly ScheduleProblem[]): ScheduleProblem[] {
  const tied = [...links, ...order.flatMap(({ step, other }) => (step !== null && other !== null ? [{ from: other, to: step }] : []))]
  const seen = connectedTo(steps[0]?.key, tied)
  return steps.flatMap(({ key }) => {
    if (seen.has(key)) return []
    const heap = connectedTo(key, tied)
    for (const each of heap) seen.add(each)
    return [refused('apart', { step: key, steps: steps.map(each => each.key).filter(each => heap.has(each)) })]
  })
}

/**
 * What of a draft cannot be, found without any time: names, faces, materials, waits, circles, loose ends, order.
 * An empty list when it holds together.
 */
export function draftProblems(draft: ScheduleDraft, sheets: Sheets): ScheduleProblem[] {
  const circle = circleOf(draft.steps.map(step => step.key), draft.links)
  const order = orderProblems(draft)
  return [
    ...draft.name === '' ? [refused('no name')] : [],
    ...draft.steps.length === 0 ? [refused('no step')] : [],
    ...partProblems(draft),
    ...draft.steps.flatMap(step => stepProblems(draft, step, sheets)),
    ...twice(draft.links.map(link => `${link.from} ${link.to}`)).map(pair => refused('wait twice', { step: pair.split(' ')[1] ?? null, other: pair.split(' ')[0] ?? null })),
    ...draft.links.flatMap(link => linkProblems(draft, link, sheets)),
    ...circle === null ? [] : [refused('circle', { step: circle[0] ?? null, steps: circle })],
    ...apartProblems(draft, order),
    ...order,
  ]
}

/** Films that lie directly on each other: the later step of each pair follows the earlier with no film between on a face of both. */
function layers({ steps, links, parts }: ScheduleDraft): [under: DraftStep, over: DraftStep][] {
  const coats = steps.filter(step => step.kind === 'coat' && step.materialId !== null)
  const after = new Map(coats.map(step => [step.key, stepsAfter(links, step.key)]))
  const follows = (a: DraftStep, b: DraftStep) => after.get(a.key)?.has(b.key) ?? false
  return coats.flatMap(under => coats.filter((over) => {
    const shared = surfacesOf(under, parts).filter(surface => surfacesOf(over, parts).includes(surface))
    return follows(under, over) && shared.some(surface => !coats.some(mid => follows(under, mid) && follows(mid, over) && surfacesOf(mid, parts).includes(surface)))
  }).map(over => [under, over] as [DraftStep, DraftStep]))
}

function systemProblems(draft: ScheduleDraft, { likely }: Reckoned, rules: readonly SystemRuleWire[]): ScheduleProblem[] {
  return layers(draft).flatMap(([under, over]) => rules.filter(rule => rule.under.includes(under.materialId ?? 0) && rule.over.includes(over.materialId ?? 0)).flatMap((rule) => {
    const at = { step: over.key, other: under.key, what: rule.text }
    if (rule.minMin === null) return [refused('never over', at)]
    const between = (likely.starts.get(over.key) ?? Infinity) - (likely.ends.get(under.key)?.work ?? 0)
    return between < rule.minMin ? [caution('too soon over', { ...at, minutes: rule.minMin })] : []
  }))
}

/** More coats a day than a working day of this many minutes lets dry between (planning value). */
const workingDay = 14 * 60

/**
 * A window nobody can use: walked from the coat before it alone, with only what itself holds up, its next step still comes
 * too late. What waits for other branches besides is no proof, since the coat may go on later.
 */
function shutWindows({ steps, links }: Reckoned): ScheduleProblem[] {
  return links.filter(link => link.windowed && link.windows.length > 0).flatMap((link) => {
    const inside = stepsAfter(links, link.from).add(link.from)
    // The doubt about its opening is no proof either: there the wait alone speaks.
    const wide = (each: typeof link) => ({ ...each, windows: each.windows.map(({ opensMin, shutsMin }) => ({ opensMin: Math.min(opensMin, 1), shutsMin })) })
    const own = { steps: steps.filter(step => inside.has(step.key)), links: links.filter(each => inside.has(each.from) && inside.has(each.to)).map(wide) }
    const walk = walkSchedule(own, { by: 'likelyMin', pieces: 1, start: 0, opens: minute => minute })
    const to = steps.find(step => step.key === link.to)
    const missed = walk.missed.find(each => each.after === link.from && each.step === to?.name)
    if (!missed) return []
    const wait = link.wait?.likelyMin ?? null
    return [refused('window shuts first', { step: link.to, other: link.from, minutes: missed.shuts - (walk.ends.get(link.from)?.work ?? 0), what: wait === null ? null : String(wait) })]
  })
}

function waitProblems(reckoned: Reckoned): ScheduleProblem[] {
  const { steps, links } = reckoned
  const endless = links.filter(link => link.wait !== null && link.wait.likelyMin === null).map(link => caution('no end', { step: link.to, other: link.from, what: link.milestone }))
  const tight = steps.filter(step => step.perDay > 1 && (step.perDay - 1) * (step.again?.likelyMin ?? 0) > workingDay).map(step => caution('round too tight', { step: step.key, minutes: step.again?.likelyMin ?? null }))
  const narrow = links.filter(({ windows }) => windows.length > 0 && windows.every(({ opensMin, shutsMin }) => shutsMin !== null && opensMin >= shutsMin)).map(link => caution('window narrow', { step: link.to, other: link.from }))
  return [...shutWindows(reckoned), ...endless, ...narrow, ...tight]
}

/** Glue-ups of one piece that take longer than their glue can be worked by its sheet: spreading, joining and clamping are one step. */
function openProblems({ steps }: ScheduleDraft, sheets: Sheets): ScheduleProblem[] {
  return steps.flatMap((step) => {
    const glue = step.kind === 'glue-up' ? sheetOf(step, sheets) : null
    return glue && glue.workMin !== null && step.pieceMin > glue.workMin ? [caution('open too short', { step: step.key, what: glue.name, minutes: glue.workMin })] : []
  })
}

/**
 * All that is wrong with a draft, first what cannot be, then what should be known. With times: windows that shut before
 * they can be used around the clock, coats too soon over others, waits without an end, glue that is not open long enough.
 */
export function scheduleProblems(draft: ScheduleDraft, sheets: Sheets, reckoned: Reckoned, rules: readonly SystemRuleWire[]): ScheduleProblem[] {
  const found = draftProblems(draft, sheets)
  const timed = found.some(each => each.code === 'circle' || each.code === 'no such step') ? [] : [...waitProblems(reckoned), ...systemProblems(draft, reckoned, rules)]
  return [...found, ...timed, ...openProblems(draft, sheets)].sort((a, b) => (a.kind === b.kind ? 0 : a.kind === 'refused' ? -1 : 1))
}
