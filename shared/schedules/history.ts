import { freshStep, insertStep } from '#shared/schedules/edit'
import { leavesFilm } from '#shared/step-kinds'
import type { Sheets } from '#shared/schedules/link'
import type { DraftPart, DraftTarget, ScheduleDraft } from '#shared/schemas/schedule-draft'
import type { CoatSize, Ground, Hold, StepKind } from '#shared/terms'

/** Something that was done to a piece: a film that is still on it, or work that left nothing wet. Instants ms UTC, minutes whole. */
export interface Done {
  kind: StepKind
  name: string
  materialId: number | null
  targets: readonly DraftTarget[]
  size: CoatSize
  ground: Ground
  hold: Hold | null
  minutes: number
  endedAt: number
  /** The studio's day it was done on, such as 2026-04-30. */
  day: string
}

const spot = ({ part, face }: DraftTarget) => `${part}.${face ?? ''}`
const looks = (done: Pick<Done, 'kind' | 'materialId' | 'targets' | 'hold' | 'size'>) => [done.kind, done.materialId ?? '', done.hold ?? '', done.size, done.targets.map(spot).sort().join(' ')].join('|')

/** Two goings of one kind, with the same material in the same size on the same faces. */
export const alike = (a: Done, b: Done) => looks(a) === looks(b)

/** What a row of doings looks like, whenever it was done: two pieces treated alike have the same. */
export const likeness = (done: readonly Done[]) => done.map(looks).join('\n')

interface Round { first: Done, days: string[] }

/** Goings of one kind right after each other, with the day of each. */
function rounds(done: readonly Done[]): Round[] {
  const found: Round[] = []
  for (const each of [...done].sort((a, b) => a.endedAt - b.endedAt)) {
    const last = found.at(-1)
    if (last && each.kind === 'coat' && alike(last.first, each)) last.days.push(each.day)
    else found.push({ first: each, days: [each.day] })
  }
  return found
}

/** "n coats a day for m days" where each day had as many; null where the days differ. */
function perDay({ days }: Round): { perDay: number, days: number } | null {
  const counts = [...new Set(days)].map(day => days.filter(each => each === day).length)
  return counts.every(count => count === counts[0]) ? { perDay: counts[0] ?? 1, days: counts.length } : null
}

/**
 * A schedule from what was done to a piece, in the order it was done: coats alike in a row become a round where their
 * days are alike, each step waits as an editor would propose it.
 */
export function draftFromDone(name: string, parts: readonly DraftPart[], done: readonly Done[], sheets: Sheets): ScheduleDraft {
  let draft: ScheduleDraft = { name, summary: '', parts: parts.map(part => ({ ...part, faces: part.faces.map(face => ({ ...face })) })), steps: [], links: [] }
  for (const round of rounds(done)) {
    const often = perDay(round)
    const { kind, materialId, targets, size, ground, hold, minutes } = round.first
    for (let time = 0; time < (often ? 1 : round.days.length); time++) {
      const plain = freshStep(draft, { kind, materialId, targets: targets.map(target => ({ ...target })) }, sheets)
      const step = { ...plain, name: round.first.name && time === 0 && !draft.steps.some(each => each.name === round.first.name) ? round.first.name : plain.name, coatSize: size, ground, hold, placeKind: hold === 'clamps' ? 'clamps' as const : plain.placeKind === 'clamps' ? null : plain.placeKind, pieceMin: Math.max(1, Math.round(minutes)), ...often ?? {} }
      draft = insertStep(draft, step, draft.steps.length, sheets)
    }
  }
  return draft
}

/** How many times in a row the same coat went on, at its longest. */
export const longestRound = (done: readonly Done[]) => rounds(done).reduce((longest, round) => Math.max(longest, round.days.length), 0)

/** The films of a schedule in their order with how often each goes on: by it a kept schedule is known again. */
export const filmsOf = (steps: readonly { kind: StepKind, materialId: number | null, perDay: number, days: number }[]) =>
  steps.filter(step => leavesFilm(step.kind)).map(step => `${step.kind} ${step.materialId ?? ''} ${step.perDay * step.days}`).join('\n')
