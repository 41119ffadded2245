import type { ScheduleDraft } from '#shared/schemas/schedule-draft'
import type { ScheduleProblem, ScheduleProblemCode } from '#shared/schedules/problems'
import { milestoneNames } from '#shared/terms'
import { listText } from '#shared/words/group'
import { waitSpan } from '#shared/words/schedules'
import { openSpan } from '#shared/words/advice-start'
import { milestoneText, titled } from '#shared/words/steps'

interface Said { step: string, other: string, what: string, minutes: number, steps: readonly string[] }

const rung = (what: string) => {
  const name = milestoneNames.find(each => each === what)
  return name ? milestoneText(name) : what
}

const sentences: Record<ScheduleProblemCode, (said: Said) => string> = {
  'no name': () => 'Give the schedule a name.',
  'no step': () => 'There is no step yet. Add the first.',
  'no part': () => 'There is no part to work on. Add one.',
  'part unnamed': () => 'A part has no name.',
  'part twice': ({ what }) => `Two parts are called “${what}”.`,
  'face unnamed': ({ what }) => `A face of “${what}” has no name.`,
  'face twice': ({ what }) => `Two faces have one name: ${what}.`,
  'key twice': ({ what }) => `The key ${what} is there twice.`,
  'step unnamed': () => 'A step has no name.',
  'touches nothing': ({ step }) => `${step} works on no part. Choose its faces.`,
  'no such part': ({ step, what }) => `${step} names a part that is not there: ${what}.`,
  'no such face': ({ step, what }) => `${step} names a face that no part has: ${what}.`,
  'lays nothing': ({ step }) => `${step} lays nothing. Choose its material.`,
  'no such material': ({ step }) => `${step} asks for a material that the studio has not got.`,
  'lays none': ({ step, what }) => `${step} names ${what === '' ? 'a material' : what} but lays none.`,
  'joins one': ({ step }) => `${step} joins fewer than two parts. Choose what is glued to what.`,
  'held for nothing': ({ step }) => `${step} is held, but glues nothing.`,
  'nobody takes it out': ({ step }) => `${step} is held and nobody takes it out. Give the minutes for taking it out.`,
  'no minutes': ({ step }) => `${step} takes no time. Give its minutes a piece.`,
  'check unnamed': ({ step }) => `A check of ${step} has no name.`,
  'checks out of order': ({ step }) => `The checks of ${step} come at the same time or out of order.`,
  'no such step': ({ what }) => `A wait names a step that is not there: ${what}.`,
  'wait twice': ({ step, other }) => `${step} waits twice for ${other}.`,
  'waits for itself': ({ step }) => `${step} waits for itself.`,
  'nothing dries': ({ step, other }) => `${step} waits for a film, but ${other} leaves none.`,
  'no such milestone': ({ step, other, what }) => `${step} waits until ${other} is ${rung(what)}, which its material never is.`,
  'no window': ({ step, other, what }) => `${step} waits for a window after ${other}, but ${what} has none.`,
  'window shuts first': ({ step, other, minutes, what }) => `${step} comes too late: the window after ${other} shuts after ${waitSpan(minutes)}, before ${what === '' ? 'it may begin' : `its wait of ${waitSpan(Number(what))} and the work between are over`}.`,
  'recovery unnamed': ({ step, other }) => `What a missed window asks for between ${other} and ${step} has no name.`,
  'circle': ({ steps }) => `These wait for each other in a circle: ${steps.join(', ')}.`,
  'apart': ({ step, steps }) => steps.length > 1 ? `${listText(steps)} lead nowhere: nothing of the rest waits for them and they wait for nothing of it.` : `${step} leads nowhere: nothing waits for it and it waits for nothing of the rest.`,
  'no order': ({ step, other, steps }) => `${other} and ${step} are on the same face, and nothing says which comes first.${steps.length > 0 ? ` It touches ${listText(steps)} too.` : ''}`,
  'never over': ({ step, other, what }) => `${step} cannot lie on ${other}. ${what}`,
  'too soon over': ({ step, other, minutes, what }) => `${step} follows ${other} sooner than ${waitSpan(minutes)}. ${what}`,
  'no end': ({ step, other, what }) => `${step} waits until ${other} is ${rung(what)}, which has no end in sight in the studio’s usual air.`,
  'window narrow': ({ step, other }) => `${step}: the window after ${other} is narrower than its doubt, so only a touch test finds it.`,
  'round too tight': ({ step, minutes }) => `${step} asks for more coats a day than dry in one: likely ${waitSpan(minutes)} between two.`,
  'open too short': ({ step, what, minutes }) => `${step} takes longer than its glue can be worked: ${what}, ${openSpan(minutes)} by its sheet. Spread only as much as is joined within that, have another pair of hands, or choose a glue that stays open longer.`,
}

/** What is wrong, with the step named: “Second coat” lays nothing. Choose its material. */
export function problemText(problem: ScheduleProblem, draft: Pick<ScheduleDraft, 'steps'>): string {
  const nameOf = (key: string | null) => titled(draft.steps.find(step => step.key === key)?.name ?? '')
  const says = sentences[problem.code]({ step: nameOf(problem.step), other: nameOf(problem.other), what: problem.what ?? '', minutes: problem.minutes ?? 0, steps: problem.steps.map(nameOf) })
  return says.charAt(0).toUpperCase() + says.slice(1)
}
