import { withCautions } from '#shared/data-sheet/complete'
import type { Edition } from '#shared/data-sheet/complete'
import { findCaution } from '#shared/library/cautions'
import { contentsOf } from '#shared/library/required-cautions'
import type { FigureName, Solvent } from '#shared/library/types'
import type { FigureWire, RungWire, WindowWire } from '#shared/schemas/material-sheet'
import { milestoneNames } from '#shared/terms'
import { sheetSources } from '#shared/words/data-sheet'
import { mixWords } from '#shared/words/mixes'

interface MixedPart { parts: number, edition: Edition }

/**
 * A private part's edition as its mix may hold it: what the studio wrote of its hazards is said to everybody, without the name.
 * @param name the part's own; wherever it is written, in small or large letters, the words for an unnamed part stand instead
 */
export function withoutName(edition: Edition, name: string): Edition {
  const named = new RegExp(name.replaceAll(/[.*+?^${}()|[\]\\]/g, '\\$&'), 'gi')
  const unnamed = (caution: string) => caution.replaceAll(named, (_, at: number) => /(^|[.!?]\s+)$/.test(caution.slice(0, at)) ? mixWords.unnamedFirst : mixWords.unnamed)
  return { ...edition, cautions: edition.cautions.map(each => findCaution(each) ? each : unnamed(each)) }
}

/** From the thinner that asks for least care to the one that asks for most. */
const thinners: readonly Solvent[] = ['none', 'water', 'mineral spirits', 'turpentine', 'aliphatic solvent', 'alcohol', 'lacquer thinner']
const careOf = (solvent: string) => {
  const at = thinners.findIndex(each => each === solvent)
  return at < 0 ? thinners.length : at
}

const from = { source: sheetSources.mixed, key: 'calc' as const }

/** Mean by parts: of the logarithm for times, plain for figures that may be zero. */
function mean(values: readonly { parts: number, value: number }[], logs: boolean): number {
  const total = values.reduce((sum, each) => sum + each.parts, 0)
  const middle = values.reduce((sum, { parts, value }) => sum + parts * (logs ? Math.log(value) : value), 0) / total
  return logs ? Math.exp(middle) : middle
}

/** A rung as the parts that have it make it; its driver is that of the largest part. Rungs that less than half the mix has are left out, unless nothing else says when it is cured. */
function mixedRungs(parts: readonly MixedPart[]): RungWire[] {
  const total = parts.reduce((sum, each) => sum + each.parts, 0)
  return milestoneNames.flatMap((name): RungWire[] => {
    const found = parts.flatMap(({ parts: share, edition }) => edition.rungs.filter(rung => rung.name === name).map(rung => ({ parts: share, rung })))
    const first = [...found].sort((a, b) => b.parts - a.parts)[0]
    if (!first || (name !== 'cured' && found.reduce((sum, each) => sum + each.parts, 0) * 2 < total)) return []
    const middle = (pick: (rung: RungWire) => number) => mean(found.map(each => ({ parts: each.parts, value: pick(each.rung) })), true)
    return [{ name, driver: first.rung.driver, low: middle(rung => rung.low), typical: middle(rung => rung.typical), high: middle(rung => rung.high), handTest: first.rung.handTest, ...from }]
  }).sort((a, b) => a.typical - b.typical)
}

type Rule = 'highest' | 'lowest' | 'mean'
const rules: Record<FigureName, Rule> = {
  'reference temperature': 'mean', 'reference humidity': 'mean', 'minimum temperature': 'highest', 'maximum temperature': 'lowest', 'humidity ceiling': 'lowest', 'dry-air floor': 'highest',
  'open time': 'lowest', 'closed assembly': 'lowest', 'working time': 'lowest', 'pot life': 'lowest', 'wet film': 'mean', 'spread rate': 'mean', 'VOC': 'mean', 'thickness exponent': 'highest',
}

function mixedFigures(parts: readonly MixedPart[]): FigureWire[] {
  return (Object.keys(rules) as FigureName[]).flatMap((name): FigureWire[] => {
    const found = parts.flatMap(({ parts: share, edition }) => edition.figures.filter(each => each.name === name).map(figure => ({ parts: share, figure })))
    const [first] = found
    if (!first) return []
    const rule = rules[name]
    const values = found.map(({ parts: share, figure }) => ({ parts: share, value: figure.typical }))
    const typical = rule === 'mean' ? mean(values, false) : Math[rule === 'highest' ? 'max' : 'min'](...values.map(each => each.value))
    return [{ name, low: null, typical, high: null, unit: first.figure.unit, ...from }]
  })
}

/** The windows of the largest part that has any, each opening with the last of the parts and shutting with the first. */
function mixedWindows(parts: readonly MixedPart[]): WindowWire[] {
  const windowed = parts.filter(each => each.edition.windows.length > 0)
  const largest = [...windowed].sort((a, b) => b.parts - a.parts)[0]
  return largest?.edition.windows.flatMap((window, at): WindowWire[] => {
    const all = windowed.flatMap(each => each.edition.windows[at] ?? [])
    const opens = all.flatMap(each => each.fromMin ?? [])
    const shuts = all.flatMap(each => each.toMin ?? [])
    const fromMin = opens.length === 0 ? null : Math.max(...opens)
    const toMin = shuts.length === 0 ? null : Math.min(...shuts)
    return toMin !== null && toMin <= (fromMin ?? 0) ? [] : [{ ...window, fromMin, toMin, ...from }]
  }) ?? []
}

/**
 * What a mix starts from: the parts-weighted geometric mean of its parts' ladders (its doubt is wider by 0.2 in log sd wherever it is reckoned),
 * each limit and thinner at the most careful of its parts, and every caution of every part.
 * @param parts one or more, all open films or all joints; `parts` above 0, by weight or by volume
 */
export function mixedEdition(parts: readonly MixedPart[]): Edition {
  const [largest] = [...parts].sort((a, b) => b.parts - a.parts)
  if (!largest) throw new RangeError('parts: expected at least one')
  const solvent = parts.map(each => each.edition.solvent).reduce((worst, each) => careOf(each) > careOf(worst) ? each : worst)
  const gloves = parts.flatMap(each => each.edition.glovesUntil ?? [])
  const edition = {
    kind: largest.edition.kind, film: largest.edition.film, solvent, mustLieLevel: parts.some(each => each.edition.mustLieLevel),
    glovesUntil: gloves.length === 0 ? null : gloves.reduce((latest, each) => milestoneNames.indexOf(each) > milestoneNames.indexOf(latest) ? each : latest),
    rungs: mixedRungs(parts), windows: mixedWindows(parts), figures: mixedFigures(parts),
  }
  return withCautions(edition, [...new Set(parts.flatMap(each => contentsOf(each.edition)))], parts.flatMap(each => each.edition.cautions))
}
