import { describe, expect, it } from 'vitest'
import { cautionParts } from '#shared/library/caution-parts'
import { briefCautions } from '#shared/library/brief-cautions'
import { cautionDeferral, cautions } from '#shared/library/cautions'
import { callSettings } from '#shared/words/call-settings'
import { callWords } from '#shared/words/calls'
import { sheetRags } from '#shared/words/sheet'
import { startVapour } from '#shared/words/vapour-starts'
import { vapourWords } from '#shared/words/vapour'
import { verdictReason } from '#shared/words/verdict'
import { wallForm } from '#shared/words/settings-page'
import { studioZone } from '#shared/time'
import { filesBelow, read } from './files'

const source = ['shared/library/caution-parts.ts', 'shared/library/cautions.ts', 'shared/library/brief-cautions.ts']
const product = ['components', 'composables', 'pages', 'layouts', 'server', 'service-worker', 'shared', 'db'].flatMap(folder => filesBelow(folder, /\.(ts|vue)$/)).filter(file => !source.includes(file))
/** What a file says, without what it remarks. */
const spoken = (file: string) => read(file).replace(/\/\*[\s\S]*?\*\/|^\s*\/\/.*$|<!--[\s\S]*?-->/gm, '')

/** What gives a warning of rags, flames, phones, fans, old ground, skin, lungs or vapour away, in whatever words around it. */
const telling = /catch(es)? fire|set(s)? themselves alight|steel wool|sander bag|bag of the sander|tablets and chargers|pilot lights?\b|can spark|flash back|scraping, heating|nose is no guide|stinging: stay out|vapour may spread|bare skin|asthma|stops dust, not vapour|wash it off with solvent|ball, bag or bin|safety data sheet and your local rules|stripper with methylene/i

describe('the words of caution', () => {
  it('stand in the library and in no other file of the product', () => {
    expect(product.length).toBeGreaterThan(300)
    expect(product.filter(file => telling.test(spoken(file)))).toEqual([])
  })

  it('are known by the pattern above: it finds every part that the library hands out', () => {
    const parts = Object.values(cautionParts)
    // A part that is only where rags go, what the heat must not reach, or what to put out holds none of the telling words by itself.
    const own = parts.filter(part => !telling.test(part))
    expect(own).toEqual([cautionParts.ragsWhere, cautionParts.noWarmAir])
    expect(telling.test(cautionDeferral)).toBe(true)
  })

  it('make up the full texts, so that a part and its caution never differ', () => {
    const text = (key: string) => cautions.find(caution => caution.key === key)?.text ?? ''
    for (const [key, parts] of Object.entries({ 'oily rags': [cautionParts.ragsHeat, cautionParts.ragsWhere, cautionParts.ragsAll], 'flames': [cautionParts.flamesOut], 'fan': [cautionParts.fanSparks, cautionParts.noWarmAir], 'phones': [cautionParts.phonesOut, cautionParts.phonesSpark], 'vapour': [cautionParts.noseTires] })) {
      for (const part of parts) expect(text(key), key).toContain(part)
    }
  })

  it('are what calls, starts, screens and the wall say of rags, vapour and a shut room', () => {
    const holds = (said: string, ...parts: (keyof typeof cautionParts)[]) => parts.forEach(part => expect(said).toContain(cautionParts[part]))
    holds(callWords.rags.body('Bench', '14:10'), 'ragsHeat', 'ragsWhere', 'ragsAll')
    expect(callWords.rags.body('Bench', '14:10')).toContain(cautionDeferral)
    holds(callWords.rags.again('Bench', '14:10'), 'ragsHeat', 'ragsWhere', 'ragsAll')
    holds(callWords.vapour.body('Booth', 'Moss', true, 'begins'), 'ignition', 'phonesOut')
    holds(callWords.vapour.body('Booth', null, false, 'film on'), 'ignition', 'phonesOut', 'spreads')
    expect(callWords.vapour.body('Booth', null, false, 'film on')).toContain(cautionDeferral)
    holds(callWords.checkRoom.body('Booth', 'Moss'), 'lookIn', 'noseTires')
    holds(callWords.leaving.solvent('Bench'), 'ignition')
    holds(callSettings.kinds.rags.hint, 'ragsHeat')
    holds(startVapour.phones, 'phonesOut')
    holds(startVapour.flames, 'ignition')
    holds(startVapour.flamesOn, 'flamesOut')
    holds(startVapour.noFan, 'fanSparks')
    holds(startVapour.warmRoom, 'noWarmAir')
    expect(startVapour.oldObject('The box', 'lead').toLowerCase()).toContain(cautionParts.untested)
    holds(verdictReason({ code: 'intake', question: 'lead' }, { now: 0, zone: studioZone('UTC') }), 'untested')
    holds(vapourWords.ragsCount, 'ragsHeat', 'ragsAll')
    holds(vapourWords.sprayArea, 'phonesOut')
    holds(wallForm.spray('Booth'), 'phonesOut', 'phonesSpark')
    expect(sheetRags('Bench', '14:10').says).toBe(`${briefCautions(['oily rags'])[0]}.`)
  })
})
