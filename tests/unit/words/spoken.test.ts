import { describe, expect, it } from 'vitest'
import { studioZone } from '#shared/time'
import { temperatureText } from '#shared/units'
import { takenText } from '#shared/words/board'
import { toldWords } from '#shared/words/hands'
import { goneText } from '#shared/words/piece'
import { blockNotes, blockTime } from '#shared/words/plan-strips'
import { putOnKey } from '#shared/words/put-on'
import { problemText } from '#shared/words/schedule-problems'
import { waitText } from '#shared/words/schedules'

const at = (text: string) => Date.parse(`${text}:00Z`)
const clock = { now: at('2026-04-07T10:00'), zone: studioZone('UTC') }

describe('small sentences', () => {
  it('say of what a key tells', () => {
    expect([putOnKey('Shellac', 2), putOnKey('Shellac', 1), putOnKey(null, 2)]).toEqual(['Shellac is on 2 pieces', 'Shellac is on', 'It is on'])
  })
  it('have one colon where what is next is late', () => {
    expect([toldWords.next('late: “Oil” was to start by 9:00'), toldWords.next('sand lightly from 13:55')]).toEqual(['Late: “Oil” was to start by 9:00.', 'Next: sand lightly from 13:55.'])
  })
  it('say of a span how long at the most, not till when', () => {
    expect(waitText({ likelyMin: 180, giveTillMin: 300, promised: true })).toBe('likely 3 h, up to 5 h')
  })
  it('end where the next fact begins', () => {
    expect(goneText(at('2026-04-06T09:00'), 'sold', clock)).toBe('Sold Mon 9:00.')
  })
  it('give the end of work its day when that is another', () => {
    expect(blockTime({ fromAt: at('2026-04-08T09:15'), toAt: at('2026-04-08T10:40') }, clock)).toBe('Wed 9:15 to 10:40')
    expect(blockTime({ fromAt: at('2026-04-07T22:00'), toAt: at('2026-04-08T00:30') }, clock)).toBe('22:00 to Wed 0:30')
  })
  it('say of a last moment whether it has gone by', () => {
    const last = (lastStartAt: number) => blockNotes({ readyAt: null, fromAt: clock.now, workAt: clock.now, lastStartAt, with: [] }, clock)[1]
    expect([last(at('2026-04-07T09:15')), last(at('2026-04-07T10:30'))]).toEqual(['The last moment to start has gone by: 9:15.', 'Last moment to start: 10:30.'])
  })
  it('never let work be ready after its own time, however coarsely that is told', () => {
    const note = (readyAt: string, workAt: string) => blockNotes({ readyAt: at(readyAt), fromAt: at(workAt), workAt: at(workAt), lastStartAt: null, with: [] }, clock)[0]
    expect(note('2026-04-09T08:10', '2026-04-09T08:35')).toBe('Ready less than half a day before.')
    expect(note('2026-04-16T09:00', '2026-04-16T15:00')).toBe('Ready less than a day before.')
    expect(note('2026-04-07T12:31', '2026-04-07T12:35')).toBe('Ready less than a quarter of an hour before.')
    expect(note('2026-04-09T08:10', '2026-04-10T08:30')).toBe('Ready from Thu afternoon.')
  })
  it('say when the work itself begins where set-up comes before it', () => {
    const first = (fromAt: string) => blockNotes({ readyAt: null, fromAt: at(fromAt), workAt: at('2026-04-08T08:35'), lastStartAt: null, with: [] }, clock)[0]
    expect([first('2026-04-08T08:30'), first('2026-04-08T08:35')]).toEqual(['Set-up comes first; the work itself begins at Wed 8:35, and that is the time to pin.', 'What it waits for is ready.'])
  })
  it('say of work for several people with whom it is done', () => {
    expect(blockNotes({ readyAt: null, fromAt: clock.now, workAt: clock.now, lastStartAt: null, with: ['Jory', 'Moss'] }, clock)[1]).toBe('It takes 3 people at once: with Jory and Moss.')
  })
  it('have a true minus below nought', () => {
    expect(temperatureText(-3.25, 'metric')).toBe('−3.3 °C')
  })
  it('count one hook as one', () => {
    expect([takenText({ kind: 'hook', taken: 1, capacity: 1 }), takenText({ kind: 'clamps', taken: 2, capacity: 4 }), takenText({ kind: 'shelf', taken: 0, capacity: 7 })]).toEqual(['1 of 1 hook', '2 of 4 clamps', '0 of 7 places'])
  })
  it('name a step that has no name without quotes', () => {
    const problem = { code: 'lays nothing' as const, step: 'a', other: null, what: null, minutes: null, steps: [] }
    expect(problemText(problem as unknown as Parameters<typeof problemText>[0], { steps: [{ key: 'a', name: '' }] } as unknown as Parameters<typeof problemText>[1])).toBe('The step without a name lays nothing. Choose its material.')
  })
})
