import { walkSchedule } from '#shared/schedule-walk'
import { leavesFilm } from '#shared/step-kinds'
import type { Walk } from '#shared/schedule-walk'
import type { ScheduleDetailWire, ScheduleLinkWire, ScheduleStepWire, WaitWire } from '#shared/schemas/schedule'
import type { DraftLink, DraftStep, ScheduleDraft } from '#shared/schemas/schedule-draft'
import type { UsualFilms } from '#shared/schedules/films'

/** What a draft comes to: its steps and waits in the studio's usual air, its two walks around the clock, its attended minutes. */
export interface Reckoned extends Pick<ScheduleDetailWire, 'steps' | 'links' | 'elapsed' | 'setupMin' | 'pieceMin'> { likely: Walk, cautious: Walk }

type Graph = Pick<ScheduleDraft, 'parts' | 'steps' | 'links'>
type Films = Pick<UsualFilms, 'wait' | 'windows'>

/**
 * Walks a draft with the drying model that every other time comes from. Elapsed is one piece around the clock from its
 * first work to its last film dry to handle; all waits late together, as damp weeks are. Whole minutes.
 * @param names the studio's materials by number; a step of one that is not there has no film
 */
export function reckonSchedule(draft: Graph, names: ReadonlyMap<number, { id: number, name: string }>, films: Films): Reckoned {
  const steps = draft.steps.map(step => stepWire(step, draft.parts, names, films))
  const links = draft.links.map(link => linkWire(link, draft.steps, films))
  const walk = (by: 'likelyMin' | 'giveTillMin') => walkSchedule({ steps, links }, { by, pieces: 1, start: 0, opens: minute => minute })
  const likely = walk('likelyMin')
  const cautious = walk('giveTillMin')
  return { steps, links, likely, cautious, elapsed: elapsedOf(steps, links, likely, cautious), ...handsOn(steps) }
}

function elapsedOf(steps: readonly ScheduleStepWire[], links: readonly ScheduleLinkWire[], likely: Walk, cautious: Walk): WaitWire {
  const waits = [...links.map(link => link.wait), ...steps.flatMap(step => [step.again, step.held, step.dry])]
  return { likelyMin: likely.end, giveTillMin: cautious.end, promised: waits.every(wait => wait === null || wait.promised) }
}

/** Attended minutes: what a batch costs once, and what each piece adds. Every coat of a round is set up anew. */
export function handsOn(steps: readonly Pick<ScheduleStepWire, 'perDay' | 'days' | 'setupMin' | 'cleanMin' | 'pieceMin' | 'releaseMin' | 'checks'>[]): { setupMin: number, pieceMin: number } {
  let setupMin = 0
  let pieceMin = 0
  for (const step of steps) {
    const turns = step.perDay * step.days
    setupMin += turns * (step.setupMin + step.cleanMin)
    pieceMin += turns * step.pieceMin + step.releaseMin + step.checks.reduce((sum, check) => sum + check.minutes, 0)
  }
  return { setupMin, pieceMin }
}

function stepWire(step: DraftStep, parts: ScheduleDraft['parts'], names: ReadonlyMap<number, { id: number, name: string }>, films: Films): ScheduleStepWire {
  const { key, name, kind, hold, dust, perDay, days, untilEnough, setupMin, pieceMin, cleanMin, releaseMin, hands } = step
  const its = step.materialId === null ? undefined : names.get(step.materialId)
  const film = leavesFilm(kind)
  const on = targetsOf(step, parts)
  return {
    key, name, kind, hold, dust, perDay, days, untilEnough, setupMin, pieceMin, cleanMin, releaseMin, hands,
    material: its ? { id: its.id, name: its.name } : null,
    parts: on.map(each => each.part), on,
    checks: step.checks.map(check => ({ name: check.name, afterMin: check.afterMin, minutes: check.minutes })),
    again: film && perDay * days > 1 ? films.wait(step, 'ready-to-recoat', 'p90') : null,
    held: film && hold !== null ? films.wait(step, 'out-of-clamps', 'p90') : null,
    dry: film && hold === null ? films.wait(step, 'dry-to-handle', 'p90') : null,
  }
}

/** What a step works on by name, in the order of the parts. */
function targetsOf(step: DraftStep, parts: ScheduleDraft['parts']): ScheduleStepWire['on'] {
  return parts.flatMap((part) => {
    const own = step.targets.filter(target => target.part === part.key)
    return own.length === 0 ? [] : [{ part: part.name, faces: part.faces.filter(face => own.some(target => target.face === face.key)).map(face => face.name) }]
  })
}

function linkWire(link: DraftLink, steps: readonly DraftStep[], films: Films): ScheduleLinkWire {
  const before = steps.find(step => step.key === link.from)
  const { from, to, milestone, risk, windowed } = link
  const wait = before && milestone !== null ? films.wait(before, milestone, risk) : null
  return { from, to, milestone, risk, windowed, wait, windows: before && windowed ? films.windows(before) : [] }
}
