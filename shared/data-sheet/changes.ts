import type { Edition } from '#shared/data-sheet/complete'
import { findCaution } from '#shared/library/cautions'
import type { Units } from '#shared/units'
import { changeWords } from '#shared/words/material-changes'
import { figureName, figureText, solventText, timeRange, windowSentences } from '#shared/words/materials'
import { milestoneText } from '#shared/words/steps'

/** Lines of one kind that came, went, or say something else than before. */
function compared<T>(before: readonly T[], after: readonly T[], keyOf: (one: T) => string, labelOf: (one: T) => string, textOf: (one: T) => string): string[] {
  const was = new Map(before.map(each => [keyOf(each), each]))
  const is = new Set(after.map(keyOf))
  return [
    ...after.flatMap((each) => {
      const old = was.get(keyOf(each))
      if (!old) return [changeWords.added(labelOf(each), textOf(each))]
      return textOf(old) === textOf(each) ? [] : [changeWords.changed(labelOf(each), textOf(old), textOf(each))]
    }),
    ...before.filter(each => !is.has(keyOf(each))).map(each => changeWords.gone(labelOf(each), textOf(each))),
  ]
}

/** What one edition says otherwise than the one before it, a sentence each; empty when they say the same. */
export function editionChanges(before: Edition, after: Edition, units: Units): string[] {
  const caution = (key: string) => findCaution(key)?.text ?? key
  const said = (edition: Edition) => windowSentences(edition.windows).join(' ')
  return [
    ...compared(before.rungs, after.rungs, each => each.name, each => milestoneText(each.name), timeRange),
    ...said(before) === said(after) ? [] : [said(after) === '' ? changeWords.noWindow : said(after)],
    ...compared(before.figures, after.figures, each => each.name, each => figureName(each.name), each => figureText(each, units)),
    ...before.solvent === after.solvent ? [] : [changeWords.changed(changeWords.solvent, solventText(before.solvent), solventText(after.solvent))],
    ...before.mustLieLevel === after.mustLieLevel ? [] : [after.mustLieLevel ? changeWords.level : changeWords.notLevel],
    ...after.cautions.filter(key => !before.cautions.includes(key)).map(key => changeWords.caution(caution(key))),
    ...before.cautions.filter(key => !after.cautions.includes(key)).map(key => changeWords.noCaution(caution(key))),
  ]
}
