import type { AdviceAnswer } from '#shared/terms'
import { temperatureGapText } from '#shared/units'
import type { Units } from '#shared/units'

export const adviceFields = { code: 'Name the advice by its code, such as blush.', answer: 'Answer with seen, waiting, going on or haze.', about: 'Name the coats or turns it is about, at most 400.', piece: 'Give the number of one piece.' } as const

const keys: Record<AdviceAnswer, string> = { 'seen': 'I have seen to it', 'waiting': 'I wait', 'going on': 'Retarder is in, I go on', 'haze': 'I see haze' }
/** What the key says. */
export const answerKey = (answer: AdviceAnswer) => keys[answer]

const told: Record<AdviceAnswer, string> = { 'seen': 'Seen to.', 'waiting': 'Waiting.', 'going on': 'Going on with retarder.', 'haze': 'Haze seen.' }
/** What stands there once it was answered. */
export const answeredText = (answer: AdviceAnswer) => told[answer]

export const answerWords = { label: 'To be minded', failed: 'What is to be minded could not be fetched.', again: 'Answer otherwise', which: (advice: string) => `Your answer to: ${advice}` } as const

/** What may be answered to advice of a kind: haze asks more than a nod. Before a coat is on there is no haze to see yet. */
export const answersTo = (code: string, isOn: boolean): AdviceAnswer[] => code === 'blush' ? ['waiting', 'going on', ...isOn ? ['haze' as const] : []] : ['seen']

/** Asked while the film dries, after somebody went on so near the dew point. */
export const hazeAfterText = (gapC: number, units: Units) => `It went on with the air ${temperatureGapText(gapC, units)} above its dew point: look whether it has hazed, so that this studio knows next time.`

/** What air this near its dew point has done to a material in this studio; null while nobody has gone on in it. */
export function hazeKnown({ wentOn, haze }: { wentOn: number, haze: number }): string | null {
  if (wentOn + haze === 0) return null
  const times = (count: number) => count === 1 ? 'once' : `${count} times`
  if (haze === 0) return `Here it was gone on with ${times(wentOn)}, and no haze was told of.`
  return `Here haze was seen ${times(haze)} of ${wentOn + haze} so near the dew point.`
}
