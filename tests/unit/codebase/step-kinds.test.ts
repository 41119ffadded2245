import { describe, expect, it } from 'vitest'
import { filesBelow, read } from './files'

const product = ['components', 'composables', 'db', 'pages', 'server', 'shared'].flatMap(folder => filesBelow(folder, /\.(ts|vue)$/))

describe('what kinds of step have in common', () => {
  // A new kind would be forgotten at every such place: the tables are checked by the types.
  it('is asked of one table, and listed nowhere else', () => {
    const pairs = /[!=]== 'coat' (?:\|\||&&) [\w.]+ [!=]== 'glue-up'|\['coat', 'glue-up'\]|\['light sanding', 'flat sanding'/
    const found = product.filter(file => read(file).split('\n').some(line => pairs.test(line)))
    expect(found).toEqual(['shared/terms.ts'])
  })
})
