import { describe, expect, it } from 'vitest'
import { filesBelow, read } from './files'

const product = ['components', 'composables', 'config', 'db', 'middleware', 'pages', 'server', 'service-worker', 'shared', 'scripts'].flatMap(folder => filesBelow(folder, /\.(ts|vue|mjs|css|json|sql)$/))
const documents = ['README.md', 'DEVELOPERS.md', '.env.example']
const everything = [...product, ...filesBelow('tests', /\.ts$/), ...documents]
// This file must write down what it forbids.
const others = everything.filter(file => file !== 'tests/unit/codebase/words.test.ts')

const linesWith = (files: string[], pattern: RegExp) => files.flatMap(file => read(file).split('\n').map((line, n) => ({ line, at: `${file}:${n + 1}` })).filter(({ line }) => pattern.test(line)).map(({ at, line }) => `${at} ${line.trim()}`))

/** The text between quotes, and in a component the text between tags: what a person can come to read. */
function spoken(file: string) {
  const source = read(file)
  const quoted = [...source.matchAll(/'((?:[^'\\\n]|\\.)*)'|"((?:[^"\\\n]|\\.)*)"|`((?:[^`\\]|\\.)*)`/g)].map(([, a, b, c]) => a ?? b ?? c ?? '')
  const tagged = file.endsWith('.vue') ? [...source.matchAll(/>([^<>{}]+)</g)].map(([, text = '']) => text) : []
  return [...quoted, ...tagged]
}

describe('the four letters', () => {
  it('stand in the product only in the heading Safety and in safety data sheet', () => {
    const said = product.filter(file => /\.(vue|ts)$/.test(file)).flatMap(file => spoken(file).map(text => ({ file, text })))
    expect(said.length).toBeGreaterThan(500)
    // `unsafe-inline` and `safe-area-inset` are browsers' words in headers and style that nobody reads.
    const stray = said.filter(({ text }) => /safe/i.test(text.replace(/unsafe-inline|safe-area-inset/g, '').replace(/\bsafety data sheets?\b/gi, '').replace(/^Safety$/, '').replace(/(#shared|~~|~|\.)?\/[\w./-]*safety[\w./-]*/g, '')))
    expect(stray).toEqual([])
  })
})

describe('what nobody else needs to know', () => {
  it('names no folder of the machine it was written on', () => {
    expect(linesWith(others, /(?<![\w~.#-])\/(home|root|Users|work|tmp\/[a-z]+)\/[\w-]+/)).toEqual([])
  })
  it('names no package registry', () => {
    expect(linesWith(others, /registry\.(npmjs|yarnpkg)|npm\.pkg/)).toEqual([])
  })
  it('leaves nothing to be done later', () => {
    expect(linesWith(others, /\b(TODO|FIXME|XXX)\b|@ts-ignore|eslint-disable|\b(it|test|describe)\.(skip|only|todo)\b/)).toEqual([])
  })
})

describe('the catalogue', () => {
  const catalogue = filesBelow('shared/words', /\.ts$/)
  it('shouts nowhere and uses no pictures for words', () => {
    const sentences = catalogue.flatMap(file => spoken(file).map(text => ({ file, text })))
    expect(sentences.filter(({ text }) => /\w!(\s|$)|\p{Extended_Pictographic}/u.test(text))).toEqual([])
  })
  it('has one kind of apostrophe, the one that print has', () => {
    const said = [...catalogue, ...filesBelow('shared/library', /\.ts$/)].flatMap(file => spoken(file).map(text => ({ file, text: text.replaceAll('\\\'', '\'') })))
    expect(said.filter(({ text }) => /[a-z]'[a-z]/i.test(text) && !text.includes('${'))).toEqual([])
  })
  it('has one plain space between a figure and its unit, and no other kind of space', () => {
    const said = catalogue.flatMap(file => spoken(file).map(text => ({ file, text })))
    expect(said.filter(({ text }) => /[\d}](°|%|µm|mm\b|min\b|kg\b|m²|m³)|[\u00a0\u2007\u2009\u202f]| {2}\S/.test(text) && !text.includes('padEnd'))).toEqual([])
  })
  it('has no hyphen for a dash or a minus', () => {
    const said = catalogue.flatMap(file => spoken(file).map(text => ({ file, text })))
    expect(said.filter(({ text }) => / - | -\d| — /.test(text) && !/[{}]/.test(text))).toEqual([])
  })
  it('says no sentence twice', () => {
    const sentences = catalogue.flatMap(file => spoken(file).filter(text => /^[A-Z].{20,}\.$/.test(text)))
    expect(sentences.filter((text, n) => sentences.indexOf(text) !== n)).toEqual([])
  })
})
