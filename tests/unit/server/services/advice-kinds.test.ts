import { and, eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { adviceAnswer } from '~~/db/schema'
import { answerAdvice } from '~~/server/services/advice/answer'
import type { ActRequest } from '#shared/schemas/act'
import type { AdviceCode } from '#shared/words/advice'
import type { StartAdvice } from '#shared/words/advice-start'
import type { Work } from '../../../helpers/advice-work'
import { atWork, coated, day, now } from '../../../helpers/advice-work'
import { hour, minute } from '../../../helpers/studio'

/** How a piece of advice comes about; `tamed`: the same where nothing is wrong. `at` is when it is asked for. */
interface Kind { says: RegExp, at?: number, about: 'coat' | 'turn', wrong(studio: Work): void, tamed(studio: Work): void }

const five = now + 7 * hour

const kinds: Record<AdviceCode | StartAdvice['code'], Kind> = {
  'air-assumed': { about: 'coat', says: /^Nobody has read the air here/, wrong: s => coated(s, 'wax'), tamed: (s) => {
    s.read(20, 0.5)
    coated(s, 'wax')
  },
  },
  'dew-margin': {
    // 14 C at 75 % has its dew point at 9.6 C: a night drop of 6 brings the room within 3 degrees of it in the evening.
    about: 'coat', at: five, says: /^Less than 3 °C above the dew point from [\d:]+: bring it in by then\.$/,
    wrong: (s) => {
      s.unheated(6)
      s.read(14, 0.75, five - hour)
      coated(s, 'alkyd-enamel', five)
    },
    tamed: (s) => {
      s.read(14, 0.75, five - hour)
      coated(s, 'alkyd-enamel', five)
    },
  },
  'below-minimum-ahead': {
    // Boiled oil asks for 5 C or more: 9 C at five less a drop of 8 is under it before morning.
    about: 'coat', at: five, says: /^The room falls under \d+ °C at .*\d\d:\d\d, while this is still wet: bring it in by then\.$/,
    wrong: (s) => {
      s.unheated(8)
      s.read(11, 0.4, five - hour)
      coated(s, 'alkyd-enamel', five)
    },
    tamed: (s) => {
      s.read(11, 0.4, five - hour)
      coated(s, 'alkyd-enamel', five)
    },
  },
  'chilled': {
    about: 'turn', says: /^The room is under \d+ °C, the least for this: warm it first/,
    wrong: (s) => {
      s.read(6, 0.6)
      s.start('painted-waxed-box')
    },
    tamed: (s) => {
      s.read(20, 0.5)
      s.start('painted-waxed-box')
    },
  },
  'cold-before-strength': {
    about: 'coat', at: five, says: /^The room falls under .* before the joint has its strength: glue that cold dries weak\./,
    wrong: (s) => {
      s.unheated(6)
      s.read(14, 0.4, five - hour)
      coated(s, 'pva-yellow', five, {}, 'glue-up on')
    },
    tamed: (s) => {
      s.read(14, 0.4, five - hour)
      coated(s, 'pva-yellow', five, {}, 'glue-up on')
    },
  },
  'too-damp': {
    about: 'coat', says: /^At 75 % humidity or more no time is promised: dry the room, or warm it to \d+ °C, to get under it\.$/,
    wrong: (s) => {
      s.read(18, 0.8)
      coated(s, 'craft-acrylic')
    },
    tamed: (s) => {
      s.read(18, 0.6)
      coated(s, 'craft-acrylic')
    },
  },
  'dry-air': {
    // 12 C at 30 % holds 2.6 g of water in a kilogram of air.
    about: 'coat', says: /^The air holds less than 5.8 g of water in a kilogram/,
    wrong: (s) => {
      s.read(12, 0.3)
      coated(s, 'cyanoacrylate', now, {}, 'glue-up on')
    },
    tamed: (s) => {
      s.read(21, 0.5)
      coated(s, 'cyanoacrylate', now, {}, 'glue-up on')
    },
  },
  'blush': {
    about: 'coat', says: /^The air is 6.8 °C above its dew point; under 11.1 °C such a film may haze\./,
    wrong: (s) => {
      s.read(20, 0.65)
      coated(s, 'shellac')
    },
    tamed: (s) => {
      s.read(20, 0.45)
      coated(s, 'shellac')
    },
  },
  'outside-measured': {
    // A flood coat is 2.5 times a normal one, a sealed ground 1.8 times slower.
    about: 'coat', says: /^This coat is 4.5 times slower than the sheet’s/,
    wrong: (s) => {
      s.read(20, 0.5)
      coated(s, 'craft-acrylic', now, { size: 'flood', ground: 'sealed' })
    },
    tamed: (s) => {
      s.read(20, 0.5)
      coated(s, 'craft-acrylic', now, { size: 'normal', ground: 'primed' })
    },
  },
  'outside-sheet': {
    about: 'coat', at: now + 6 * day, says: /^Over three times the longest on the sheet/,
    wrong: (s) => {
      s.read(20, 0.5)
      const ids = coated(s, 'craft-acrylic')
      s.tell('touch test', ids, { milestone: 'dry-to-handle', reached: false,
      },
      now + 5 * day)
    },
    tamed: (s) => {
      s.read(20, 0.5)
      const ids = coated(s, 'craft-acrylic')
      s.tell('touch test', ids, { milestone: 'dry-to-handle', reached: true,
      },
      now + 5 * day)
    },
  },
  'fan-early': {
    about: 'coat', at: now + 5 * minute, says: /^Keep the fan off until it is tack-free/,
    wrong: (s) => {
      s.read(20, 0.5)
      const ids = coated(s, 'water-polyurethane')
      s.tell('air', ids, { kind: 'moving', minutes: null,
      },
      now + minute)
    }, tamed: (s) => {
      s.read(20, 0.5)
      coated(s, 'water-polyurethane')
    },
  },
  'forced-drying': {
    about: 'coat', at: now + 5 * minute, says: /^Sun or warm air on it: the times are less sure, and nothing is learned from this coat\.$/,
    wrong: (s) => {
      s.read(20, 0.5)
      const ids = coated(s, 'craft-acrylic')
      s.tell('air', ids, { kind: 'sun', minutes: null,
      },
      now + minute)
    }, tamed: (s) => {
      s.read(20, 0.5)
      coated(s, 'craft-acrylic')
    },
  },
  'covered-early': {
    about: 'coat', at: now + 2 * hour, says: /^It takes air to harden: do not cover it before Thu 10:00, two days after it went on\.$/,
    wrong: (s) => {
      s.read(20, 0.5)
      const ids = coated(s, 'boiled-linseed-oil')
      s.tell('air', ids, { kind: 'covered', minutes: null,
      },
      now + hour)
    }, tamed: (s) => {
      s.read(20, 0.5)
      coated(s, 'boiled-linseed-oil')
    },
  },
  'over-too-early': {
    about: 'turn', at: now + 60 * hour, says: /^Water-based over oil-based: wait three days\. The film beneath went on Tue 10:00: not before Fri 10:00\.$/,
    wrong: (s) => {
      s.read(20, 0.5)
      coated(s, 'boiled-linseed-oil')
    },
    tamed: (s) => {
      s.read(20, 0.5)
      coated(s, 'shellac')
    },
  },
  'over-better-later': {
    // Acrylic paint on gesso: an hour at least, overnight (eight hours) is better. The painted ground of a case is next.
    about: 'turn', at: now + 2 * hour, says: /Overnight is better\. The film beneath went on 10:00: better from 18:00\.$/,
    wrong: (s) => {
      s.read(20, 0.5)
      onBook(s, 'acrylic-gesso')
    },
    tamed: (s) => {
      s.read(20, 0.5)
      onBook(s, null)
    },
  },
  'never-over': {
    about: 'turn', says: /^Nothing sticks on top of wax\. Strip the film beneath/,
    wrong: (s) => {
      s.read(20, 0.5)
      coated(s, 'wax')
    },
    tamed: (s) => {
      s.read(20, 0.5)
      s.start('painted-waxed-box')
    },
  },
  'acclimatise': {
    // Three weeks at 85 % in the spray room, then glued at once at 40 %.
    about: 'turn', says: /^Wood and board here come to rest at 7\.\d % moisture; these are near 1\d\.\d %, from where they lay\. Let them lie here till Sat 18 Apr, or the joint is strained/,
    wrong: s => joint(s, 0.85), tamed: s => joint(s, 0.42),
  },
  'still-air': {
    about: 'turn', says: /^Somebody said that the air moves here: leaf wants it still\.$/,
    wrong: s => gilding(s, ['lay-leaf'], { kind: 'moving', minutes: null }), tamed: s => gilding(s, ['lay-leaf'], null),
  },
  'pot-life': {
    // A rise of 10 C halves it: 10.5 min at 22 C is about 5 at 32 C.
    about: 'turn', says: /^At 32 °C what is mixed lasts about 5 min; the sheet says 11\. A deep pot goes off sooner: mix less\.$/,
    wrong: s => resin(s, 32), tamed: s => resin(s, 22),
  },
  'several-mixes': {
    // 9 min at the least at 22 C: one tray of 6 minutes, not two.
    about: 'turn', says: /^What is mixed may go off after 9 min: enough for 1 of these 2\. Mix 2 times\.$/,
    wrong: s => [22, 22].forEach(tempC => resin(s, tempC)), tamed: s => resin(s, 22),
  },
  'open-time': {
    // Bookbinder's glue is open for 1 min at 20 C at the least, less at 21, and a spine takes 10. A frame takes 8: 4 min open, 10 more joined.
    about: 'turn', says: /^Once spread, this glue may skin over or set within a minute; this glue-up takes 10\. Spread only as much as is joined within that/,
    wrong: s => gluing(s, 'cased-book', 'line-spine'), tamed: s => gluing(s, 'mitred-frame', 'glue-up'),
  },
  'pack-early': {
    about: 'turn', at: now + 40 * hour, says: /^Wrapped before 10:00 it may print/,
    wrong: s => packed(s, now), tamed: s => packed(s, now - 9 * hour),
  },
}

/** Mouldings that lay for three weeks in the spray room's damp, or not, and are to be glued up where it is 20 C and 40 %. */
function joint(s: Work, rh: number) {
  const from = now - 21 * day
  for (let at = from; at < now; at += 12 * hour) s.read(20, rh, at, s.rooms.spray)
  for (let at = from; at < now; at += 12 * hour) s.read(20, 0.4, at)
  const ids = s.start('mitred-frame', from, s.places.booth)
  s.leaveAllBut('mitred-frame', ids, ['glue-up'], now - 2 * hour)
  s.tell('moved', ids, { placeId: s.places.shelf }, now - minute)
}

/** A book's case, about to get its painted ground, perhaps over a coat of something. */
function onBook(s: Work, under: string | null) {
  const ids = s.start('cased-book')
  s.leaveAllBut('cased-book', ids, ['colour'])
  if (under !== null) s.tell('coat on', ids, { step: null, materialVersionId: s.materialOf(under) })
}

/** A tray about to be sealed with resin. */
function resin(s: Work, tempC: number) {
  s.read(tempC, 0.4)
  s.leaveAllBut('resin-tray', s.start('resin-tray'), ['seal'])
}

/** A piece about to be glued in the air of most glues' sheets. */
function gluing(s: Work, schedule: string, step: string) {
  s.read(21, 0.5)
  s.leaveAllBut(schedule, s.start(schedule), [step])
}

/** A frame to be gilded, all left out but some steps, and what was said of the air on it. */
function gilding(s: Work, kept: string[], air: ActRequest['body'] | null) {
  s.read(20, 0.5)
  const ids = s.start('water-gilded-frame')
  s.leaveAllBut('water-gilded-frame', ids, kept)
  if (air) s.tell('air', ids, air)
}

/** A frame whose last coat went on at `at`, about to be wrapped. */
function packed(s: Work, at: number) {
  s.read(20, 0.5, at - hour)
  const ids = s.start('mitred-frame', at)
  s.leaveAllBut('mitred-frame', ids, ['pack'], at)
  s.tell('coat on', ids, { step: null, materialVersionId: s.materialOf('wax') }, at)
}

describe('advice of every kind', () => {
  it.each(Object.entries(kinds))('%s comes where it acts, with its figures, and not where nothing is wrong', (code, { says, at = now, about, wrong, tamed }) => {
    const studio = atWork()
    wrong(studio)
    const line = studio.line(code, at)
    expect(line?.text).toMatch(says)
    expect((about === 'coat' ? line?.coatIds : line?.turnIds)?.length).toBeGreaterThan(0)
    const other = atWork()
    tamed(other)
    expect(other.line(code, at)).toBeUndefined()
  })

  it.each(Object.entries(kinds))('%s is answered with a key, and the answer stands beside it from then on', (code, { at = now, wrong }) => {
    const { db, studioId, members, line, ...studio } = atWork()
    wrong({ db, studioId, members, line, ...studio })
    const before = line(code, at)!
    expect(before.answered).toBeNull()
    expect(before.answers.length).toBeGreaterThan(0)
    const [answer] = before.answers
    expect(answerAdvice(db, studioId, members.maker, { code, answer: answer!, coatIds: before.coatIds, turnIds: before.turnIds }, at)).toEqual({ ok: true })
    expect(line(code, at)).toMatchObject({ answered: answer, text: before.text, coatIds: before.coatIds, turnIds: before.turnIds })
    expect(line(code, at + 10 * minute)?.answered ?? answer).toBe(answer)
    const kept = db.select().from(adviceAnswer).where(and(eq(adviceAnswer.studioId, studioId), eq(adviceAnswer.code, code))).all()
    expect(kept.map(row => [row.answer, row.memberId])).toEqual([...before.coatIds, ...before.turnIds].map(() => [answer, members.maker.id]))
  })
})
