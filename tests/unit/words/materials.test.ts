import { describe, expect, it } from 'vitest'
import { figureText, sheetTime, sourceText, timeRange, windowSentences } from '#shared/words/materials'

describe('the words of a material sheet', () => {
  it('say a time as a sheet does', () => {
    // 90 min stays in hours and minutes, 36 h in hours, 3 days in days.
    expect([0.5, 20, 90, 2160, 4320, 34_560].map(sheetTime)).toEqual(['30 s', '20 min', '1 h 30 min', '36 h', '3 days', '24 days'])
    expect(timeRange({ low: 30, typical: 60, high: 120 })).toBe('1 h, between 30 min and 2 h')
  })
  it('say the forbidden middle of two windows and what a missed one asks for', () => {
    expect(windowSentences([{ fromMin: 0, toMin: 60, recovery: 'Wait until it is hard, then scuff it' }, { fromMin: 2880, toMin: null, recovery: null }])).toEqual([
      'The next coat may go on at once until 1 h.',
      'Between 1 h and 2 days it must be left alone. Missed it: wait until it is hard, then scuff it.',
      'The next coat may go on from 2 days onwards.',
    ])
    expect(windowSentences([{ fromMin: 60, toMin: 300, recovery: null }])[1]).toBe('After 5 h the window is shut.')
  })
  it('turn a figure into the studio’s units', () => {
    expect(figureText({ low: null, typical: 10, high: null, unit: 'C' }, 'us')).toBe('50 °F')
    expect(figureText({ low: 50, typical: 80, high: 120, unit: 'µm' }, 'metric')).toBe('80 µm, between 50 and 120 µm')
    expect([timeRange({ low: 2880, typical: 4320, high: 5760 }), timeRange({ low: 30, typical: 60, high: 120 }), timeRange({ low: 61, typical: 70, high: 80 })]).toEqual(['3 days, between 2 and 4 days', '1 h, between 30 min and 2 h', '1 h 10 min, between 1 h 1 min and 1 h 20 min'])
    // 25.4 µm to the mil.
    expect(figureText({ low: null, typical: 76.2, high: null, unit: 'µm' }, 'us')).toBe('3 mil')
    // 453.59237 g to the pound, 3.785411784 L to the US gallon.
    expect(figureText({ low: null, typical: 2.9 * 453.59237 / 3.785411784, high: null, unit: 'g/L' }, 'us')).toBe('2.9 lb per gallon')
    expect(figureText({ low: null, typical: 347.5, high: null, unit: 'g/L' }, 'metric')).toBe('348 g per litre')
  })
  it('say where a figure is from once', () => {
    expect(sourceText({ source: 'planning value', key: 'planning value' })).toBe('a planning value of ours')
    expect(sourceText({ source: 'trade article, sign enamel, seen', key: 'S' })).toBe('trade article, sign enamel, seen')
    expect(sourceText({ source: 'trade page, hide glue, seen', key: 'S-' })).toBe('trade page, hide glue, seen (second hand)')
    expect(sourceText({ source: 'common practice', key: 'CP' })).toBe('common practice')
    expect(sourceText({ source: 'from memory: check the data sheet', key: 'M' })).toBe('from memory: check the data sheet')
    expect(sourceText({ source: 'the studio’s own figure', key: 'own' })).toBe('the studio’s own figure')
    expect(sourceText({ source: 'a neighbour', key: 'own' })).toBe('a neighbour (the studio’s own)')
  })
})
