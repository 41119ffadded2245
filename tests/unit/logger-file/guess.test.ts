import { describe, expect, it } from 'vitest'
import { guessDelimiter } from '#shared/logger-file/delimiter'
import { guessPlan } from '#shared/logger-file/guess'

const rowsOf = (text: string, mark = ';') => text.split('\n').map(line => line.split(mark))

describe('what parts the cells', () => {
  it.each([
    ['a comma', 'time,temp,rh\n2026-02-01 10:00,19.4,56\n2026-02-01 10:10,19.5,55', ','],
    ['a semicolon, with comma decimals', 'Zeit;T;RH\n01.02.2026 10:00;19,4;56,2\n01.02.2026 10:10;19,5;55,9', ';'],
    ['a tab, with comma decimals', 'time\ttemp\trh\n01.02.2026 10:00\t19,4\t56,2\n01.02.2026 10:10\t19,5\t55,9', '\t'],
    ['a bar', '2026-02-01 10:00|19.4|56\n2026-02-01 10:10|19.5|55', '|'],
    ['a comma beside quoted comma decimals', '"01.02.2026 10:00","19,4","56,2"\n"01.02.2026 10:10","19,5","55,9"', ','],
    ['a comma below notes that hold a semicolon', 'Logger; shed\ntime,temp,rh\n2026-02-01 10:00,19.4,56\n2026-02-01 10:10,19.5,55', ','],
  ])('%s', (_name, text, mark) => expect(guessDelimiter(text)).toBe(mark))
})

describe('a plan', () => {
  it('is found from headings below some notes', () => {
    const guess = guessPlan(rowsOf('Logger 7;shed\nStarted;01.02.2026\n\nNo;Date and time;Temperature (°C);Dew point (°C);Humidity (%)\n1;01.02.2026 10:00;19,4;10,5;56,2\n2;01.02.2026 10:10;19,5;10,4;55,9\n3;13.02.2026 10:20;19,5;10,4;55,9'), 'metric')
    expect(guess.plan).toEqual({ decimal: ',', firstRow: 4, dateColumn: 1, timeColumn: null, tempColumn: 2, humidityColumn: 4, tempUnit: 'C', humidityUnit: 'percent', order: 'day', newestFirst: false, zone: 'studio' })
    expect(guess.doubts).toEqual([])
    expect(guess.headings).toEqual(['No', 'Date and time', 'Temperature (°C)', 'Dew point (°C)', 'Humidity (%)'])
  })
  it('is found without headings, and says that the columns are only guessed', () => {
    const { plan, doubts } = guessPlan(rowsOf('1;2026-02-01 10:00;19.4;56.2\n2;2026-02-01 10:10;19.5;55.9\n3;2026-02-01 10:20;19.6;55.9'), 'metric')
    expect(plan).toMatchObject({ firstRow: 0, dateColumn: 1, tempColumn: 2, humidityColumn: 3, decimal: '.', order: 'year' })
    expect(doubts).toEqual(['columns', 'tempUnit'])
  })
  it('takes a date and a time from two columns', () => {
    const { plan } = guessPlan(rowsOf('Date;Time;RH;Temp\n2/1/2026;10:00 AM;56;67\n2/1/2026;10:10 AM;55;67\n2/14/2026;1:10 PM;55;67'), 'us')
    expect(plan).toMatchObject({ dateColumn: 0, timeColumn: 1, tempColumn: 3, humidityColumn: 2, order: 'month', tempUnit: 'F' })
  })
  it('has no temperature where the file has none', () => {
    expect(guessPlan(rowsOf('time;humidity\n2026-02-01 10:00;56\n2026-02-01 10:10;57'), 'metric').plan).toMatchObject({ tempColumn: null, humidityColumn: 1 })
  })
  it('leaves out what it does not find', () => {
    expect(guessPlan(rowsOf('a;b\nc;d'), 'metric').plan).toMatchObject({ dateColumn: null, tempColumn: null, humidityColumn: null })
    expect(guessPlan([], 'metric').plan).toMatchObject({ dateColumn: null })
  })
})

const ordered = (dates: string[], units: 'metric' | 'us' = 'metric') => {
  const { plan, doubts } = guessPlan([['time', 'temp °C', 'rh %'], ...dates.map(date => [`${date} 10:00`, '19', '50'])], units)
  return { order: plan.order, doubtful: doubts.includes('order') }
}

describe('the way the lines run', () => {
  it('is seen from the first and the last', () => {
    expect(guessPlan(rowsOf('2026-02-02 10:10;19;50\n2026-02-02 10:00;19;50\n2026-02-01 10:00;19;50'), 'metric').plan.newestFirst).toBe(true)
  })
})

describe('the order of a date', () => {
  it('follows from a day past the twelfth', () => {
    expect(ordered(['05/02/2026', '13/02/2026'])).toEqual({ order: 'day', doubtful: false })
    expect(ordered(['02/05/2026', '02/13/2026'])).toEqual({ order: 'month', doubtful: false })
  })
  it('follows from days in a row: the other order would leap by months', () => {
    expect(ordered(['01/02/2026', '02/02/2026', '03/02/2026'])).toEqual({ order: 'day', doubtful: false })
    expect(ordered(['02/01/2026', '02/02/2026', '02/03/2026'])).toEqual({ order: 'month', doubtful: false })
  })
  it('is the studio’s habit and doubtful where nothing tells', () => {
    expect(ordered(['02/02/2026', '02/02/2026'])).toEqual({ order: 'day', doubtful: true })
    expect(ordered(['02/02/2026', '02/02/2026'], 'us')).toEqual({ order: 'month', doubtful: true })
  })
  it('is not asked where the year stands first or the month has a name', () => {
    expect(ordered(['2026-02-01', '2026-02-02'])).toEqual({ order: 'year', doubtful: false })
    expect(ordered(['1 Feb 2026', '2 Feb 2026']).doubtful).toBe(false)
  })
  it('may have a year of two figures in front', () => {
    expect(ordered(['26-02-27', '26-02-28', '26-03-01'])).toEqual({ order: 'year', doubtful: false })
  })
})

const figures = (heading: string[], cells: string[]) => guessPlan([heading, ['2026-02-01 10:00', ...cells], ['2026-02-01 10:10', ...cells]], 'metric')

describe('units', () => {
  it.each([['Temp (°F)', '66.2', 'F'], ['temp_c', '19', 'C'], ['Temperature', '66.2', 'F'], ['Temperature', '19.2', 'C']])('%s with %s is in %s', (heading, cell, unit) => {
    expect(figures(['time', heading, 'rh'], [cell, '50']).plan.tempUnit).toBe(unit)
  })
  it.each([['Temp (F)', 'F'], ['temp_f', 'F'], ['temp C', 'C']])('%s is taken at its word on a cold day', (heading, unit) => {
    const { plan, doubts } = figures(['time', heading, 'rh'], ['34', '50'])
    expect([plan.tempUnit, doubts.includes('tempUnit')]).toEqual([unit, false])
  })
  it('stand beside the figure too', () => expect(figures(['time', 'Temp', 'rh'], ['44 °F', '50']).plan.tempUnit).toBe('F'))
  it('of humidity are shares where no figure is over one', () => {
    expect(figures(['time', 'temp', 'rh'], ['19', '0.56']).plan.humidityUnit).toBe('share')
    expect(figures(['time', 'temp', 'rh'], ['19', '56']).plan.humidityUnit).toBe('percent')
  })
  it('of time stand in the heading', () => {
    expect(figures(['Time (GMT+01:00)', 'temp', 'rh'], ['19', '56']).plan.zone).toBe(60)
    expect(figures(['Time, UTC-3:30', 'temp', 'rh'], ['19', '56']).plan.zone).toBe(-210)
    expect(figures(['Time UTC', 'temp', 'rh'], ['19', '56']).plan.zone).toBe(0)
    expect(figures(['Time', 'temp', 'rh'], ['19', '56']).plan.zone).toBe('studio')
  })
  it('of time are in the file where every cell says its own', () => {
    expect(guessPlan(rowsOf('time;temp;rh\n2026-02-01T10:00:00Z;19;50\n2026-02-01T10:10:00Z;19;50'), 'metric').zoneInFile).toBe(true)
    expect(guessPlan(rowsOf('time;temp;rh\n2026-02-01T10:00:00;19;50\n2026-02-01T10:10:00;19;50'), 'metric').zoneInFile).toBe(false)
  })
})
