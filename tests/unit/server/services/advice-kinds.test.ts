import { and, eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { adviceAnswer } from '~~/db/schema'
import { answerAdvice } from '~~/server/services/advice/answer'
import type { ActRequest } from '#shared/schemas/act'
import type { CoatSize, Ground } from '#shared/terms'
import type { AdviceCode } from '#shared/words/advice'
import type { StartAdvice } from '#shared/words/advice-start'
import type { Work } from '../../../helpers/advice-work'
import { atWork, coated, day, now } from '../../../helpers/advice-work'
import { hour, minute } from '../../../helpers/studio'

/** How a piece of advice comes about; `tamed`: the same where nothing is wrong. `at` is when it is asked for. */
interface Kind { says: RegExp, at?: number, about: 'coat' | 'turn', wrong(studio: Work): void, tamed(studio: Work): void }

const five = now + 7 * hour

/** The same scene twice: with what goes wrong, and with what does not. */
function either<Given>(scene: (studio: Work, given: Given) => void, wrong: Given, tamed: Given): Pick<Kind, 'wrong' | 'tamed'> {
  return { wrong: studio => scene(studio, wrong), tamed: studio => scene(studio, tamed) }
}

/** A coat of a material in air of so many °C and such a humidity. */
const inAir = (material: string, kind: 'coat on' | 'glue-up on' = 'coat on') => (s: Work, [tempC, rh]: readonly [number, number]) => {
  s.read(tempC, rh)
  coated(s, material, now, {}, kind)
}

/** A coat put on at five in a room that the night cools by so much; 0 in one that is heated. */
const overNight = (material: string, [tempC, rh]: readonly [number, number], kind: 'coat on' | 'glue-up on' = 'coat on') => (s: Work, nightDropC: number) => {
  if (nightDropC > 0) s.unheated(nightDropC)
  s.read(tempC, rh, five - hour)
  coated(s, material, five, {}, kind)
}

/** A coat, and what somebody says of the air on it a while later; null where nobody says anything. */
const withAir = (material: string, after: number) => (s: Work, body: ActRequest['body'] | null) => {
  s.read(20, 0.5)
  const ids = coated(s, material)
  if (body) s.tell('air', ids, body, now + after)
}

const kinds: Record<AdviceCode | StartAdvice['code'], Kind> = {
  'air-assumed': { about: 'coat', says: /^Nobody has read the air here/, ...either((s, isRead: boolean) => {
    if (isRead) s.read(20, 0.5)
    coated(s, 'wax')
  }, false, true) },
  'dew-margin': {
    // 14 C at 75 % has its dew point at 9.6 C: a night drop of 6 brings the room within 3 degrees of it in the evening.
    about: 'coat', at: five, says: /^Less than 3 °C above the dew point from [\d:]+: bring it in by then\.$/,
    ...either(overNight('alkyd-enamel', [14, 0.75]), 6, 0),
  },
  'below-minimum-ahead': {
    // The enamel asks for 5 C or more: 11 C at five less a drop of 8 is under it before morning.
    about: 'coat', at: five, says: /^The room falls under \d+ °C at .*\d\d:\d\d, while this is still wet: bring it in by then\.$/,
    ...either(overNight('alkyd-enamel', [11, 0.4]), 8, 0),
  },
  'chilled': {
    about: 'turn', says: /^The room is under \d+ °C, the least for this: warm it first/,
    ...either((s, [tempC, rh]: readonly [number, number]) => {
      s.read(tempC, rh)
      s.start('painted-waxed-box')
    }, [6, 0.6], [20, 0.5]),
  },
  'cold-before-strength': {
    about: 'coat', at: five, says: /^The room falls under .* before the joint has its strength: glue that cold dries weak\./,
    ...either(overNight('pva-yellow', [14, 0.4], 'glue-up on'), 6, 0),
  },
  'too-damp': {
    about: 'coat', says: /^At 75 % humidity or more no time is promised: dry the room, or warm it to \d+ °C, to get under it\.$/,
    ...either(inAir('craft-acrylic'), [18, 0.8], [18, 0.6]),
  },
  'dry-air': {
    // 12 C at 30 % holds 2.6 g of water in a kilogram of air.
    about: 'coat', says: /^The air holds less than 5.8 g of water in a kilogram/,
    ...either(inAir('cyanoacrylate', 'glue-up on'), [12, 0.3], [21, 0.5]),
  },
  'blush': {
    about: 'coat', says: /^The air is 6.8 °C above its dew point; under 11.1 °C such a film may haze\./,
    ...either(inAir('shellac'), [20, 0.65], [20, 0.45]),
  },
  'outside-measured': {
    // A flood coat is 2.5 times a normal one, a sealed ground 1.8 times slower.
    about: 'coat', says: /^This coat is 4.5 times slower than the sheet’s/,
    ...either((s, how: { size: CoatSize, ground: Ground }) => {
      s.read(20, 0.5)
      coated(s, 'craft-acrylic', now, how)
    }, { size: 'flood', ground: 'sealed' }, { size: 'normal', ground: 'primed' }),
  },
  'outside-sheet': {
    about: 'coat', at: now + 6 * day, says: /^Over three times the longest on the sheet/,
    ...either((s, reached: boolean) => {
      s.read(20, 0.5)
      s.tell('touch test', coated(s, 'craft-acrylic'), { milestone: 'dry-to-handle', reached }, now + 5 * day)
    }, false, true),
  },
  'fan-early': {
    about: 'coat', at: now + 5 * minute, says: /^Keep the fan off until it is tack-free/,
    ...either(withAir('water-polyurethane', minute), { kind: 'moving', minutes: null }, null),
  },
  'forced-drying': {
    about: 'coat', at: now + 5 * minute, says: /^Sun or warm air on it: the times are less sure, and nothing is learned from this coat\.$/,
    ...either(withAir('craft-acrylic', minute), { kind: 'sun', minutes: null }, null),
  },
  'covered-early': {
    about: 'coat', at: now + 2 * hour, says: /^It takes air to harden: do not cover it before Thu 10:00, two days after it went on\.$/,
    ...either(withAir('boiled-linseed-oil', hour), { kind: 'covered', minutes: null }, null),
  },
  'over-too-early': {
    about: 'turn', at: now + 60 * hour, says: /^Water-based over oil-based: wait three days\. The film beneath went on Tue 10:00: not before Fri 10:00\.$/,
    ...either((s, beneath: string) => inAir(beneath)(s, [20, 0.5]), 'boiled-linseed-oil', 'shellac'),
  },
  'over-better-later': {
    // Acrylic paint on gesso: an hour at least, overnight (eight hours) is better. The painted ground of a case is next.
    about: 'turn', at: now + 2 * hour, says: /Overnight is better\. The film beneath went on 10:00: better from 18:00\.$/,
    ...either(onBook, 'acrylic-gesso', null),
  },
  'never-over': {
    about: 'turn', says: /^Nothing sticks on top of wax\. Strip the film beneath/,
    ...either((s, isWaxed: boolean) => {
      s.read(20, 0.5)
      if (isWaxed) coated(s, 'wax')
      else s.start('painted-waxed-box')
    }, true, false),
  },
  'acclimatise': {
    // Three weeks at 85 % in the spray room, then glued at once at 40 %.
    about: 'turn', says: /^Wood and board here come to rest at 7\.\d % moisture; these are near 1\d\.\d %, from where they lay\. Let them lie here till Sat 18 Apr, or the joint is strained/,
    ...either(joint, 0.85, 0.42),
  },
  'still-air': {
    about: 'turn', says: /^Somebody said that the air moves here: leaf wants it still\.$/,
    wrong: s => gilding(s, ['lay-leaf'], { kind: 'moving', minutes: null }), tamed: s => gilding(s, ['lay-leaf'], null),
  },
  'pot-life': {
    // A rise of 10 C halves it: 10.5 min at 22 C is about 5 at 32 C.
    about: 'turn', says: /^At 32 °C what is mixed lasts about 5 min; the sheet says 11\. A deep pot goes off sooner: mix less\.$/,
    ...either(resin, 32, 22),
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
    ...either(packed, now, now - 9 * hour),
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
  s.read(20, 0.5)
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
