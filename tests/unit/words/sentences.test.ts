import { describe, expect, it } from 'vitest'
import { moveCauses } from './causes'
import { studioZone } from '#shared/time'
import type { BeginReason } from '#shared/verdict/begin'
import { beginReason, momentText } from '#shared/words/moments'
import { branchText, waitsForText } from '#shared/words/piece'
import { photoAlt } from '#shared/words/photos'
import { pinWords } from '#shared/words/pins'
import { causeText } from '#shared/words/plan-moves'
import { asStep } from '#shared/words/put-on'
import { editorWords, legText, waitFields } from '#shared/words/schedule-editor'
import { changeText } from '#shared/words/schedule-changes'
import { linkText } from '#shared/words/schedules'
import { missedText } from '#shared/words/start'
import { startLines } from '#shared/words/start-check'
import { verdictReason } from '#shared/words/verdict'

// Names as the trade gives them: many are commands.
const oil = 'Oil the neck'
const sew = 'Sew the block'
const now = Date.parse('2026-04-07T10:00:00Z')
const clock = { now, zone: studioZone('UTC') }
const hour = 3_600_000

const reasons: BeginReason[] = [
  { code: 'waits for', step: oil }, { code: 'unknown film', step: oil }, { code: 'window to come', step: oil }, { code: 'window shut', step: oil },
  { code: 'held', step: oil, hold: 'clamps' }, { code: 'drying', step: oil, milestone: 'ready-to-recoat' },
]
const link = { from: 'a', to: 'b', milestone: 'ready-to-recoat' as const, risk: 'p98' as const, windowed: false, windows: [], wait: { likelyMin: 180, giveTillMin: 300, promised: true }, recovery: null }
const ways = [{ code: 'milestone' as const, milestone: 'full-strength' as const }, { code: 'window' as const }, { code: 'held' as const }, { code: 'work' as const }]

/** Every sentence that has a step's name inside it. */
const sentences: readonly string[] = [
  ...reasons.map(beginReason),
  momentText({ kind: 'start by', stepId: 1, at: now + hour, what: oil, stepKind: 'coat', shutsAt: null, pieces: null }, clock),
  momentText({ kind: 'start by', stepId: 1, at: now - hour, what: oil, stepKind: 'coat', shutsAt: null, pieces: null }, clock),
  linkText(link as unknown as Parameters<typeof linkText>[0], { name: oil }), linkText({ ...link, milestone: null } as unknown as Parameters<typeof linkText>[0], { name: sew }),
  ...ways.map(because => legText({ because: { ...because, from: 'a' } } as unknown as Parameters<typeof legText>[0], () => sew)),
  waitFields.after(sew), ...[editorWords.changed, editorWords.added, editorWords.copied, editorWords.removed, editorWords.waitChanged, editorWords.waitGone].map(say => say(oil)), editorWords.moved(oil, 1),
  ...(['wait added', 'wait gone', 'wait changed'] as const).map(code => changeText({ code, of: oil, after: sew })),
  waitsForText([oil, sew]), branchText({ fromStep: oil, sinceAt: now, rejoined: false }, clock), photoAlt({ step: oil, moment: 'after', caption: '' }, 'Lute 1'),
  pinWords.stepFirst(oil, sew, now, clock), pinWords.taken('Moss', oil), pinWords.followed(oil, sew), pinWords.apart(oil, sew), pinWords.notAble('Moss', oil),
  ...moveCauses(oil, now).map(why => causeText(why, clock, 'metric')),
  missedText(oil, now, now + hour, clock),
  ...startLines({ start: 'now', startsAt: now, closed: false, endsAt: now, without: 0, missed: [{ step: oil, opensAt: now, shutsAt: now + hour }], hands: { most: 1, minutes: 5 }, pushes: [] } as unknown as Parameters<typeof startLines>[0], clock).map(each => each.says),
  asStep([{ step: { name: oil }, pieces: [] }] as unknown as Parameters<typeof asStep>[0]),
  verdictReason({ code: 'coat due', what: oil, at: now }, clock),
]

describe('a step whose name is a command', () => {
  it.each(sentences.filter(text => /oil the neck|sew the block/i.test(text)))('stands in quotes: %s', (text) => {
    expect(text.replace(/“(Oil the neck|Sew the block)”/g, '')).not.toMatch(/oil the neck|sew the block/i)
  })
  it('is looked for in many sentences', () => {
    // Each of the sentences above but the one cause of a move that names no step, and what else a start is told.
    expect(sentences.filter(text => /oil the neck|sew the block/i.test(text)).length).toBeGreaterThan(38)
  })
})
