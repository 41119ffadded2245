import { readFileSync, readdirSync } from 'node:fs'
import { describe, expect, it } from 'vitest'

/** Classes the look rules out, or that its Tailwind theme does not make and that would silently do nothing. */
const refused = /(?<![\w-])(?:shadow(?:-(?!none)[\w-]+)?|drop-shadow[\w-]*|bg-gradient[\w-]*|rounded-(?:sm|md|lg|xl|2xl|3xl|full)|text-(?:xs|sm|base|lg|xl|[2-9]xl)|(?:bg|text|border)-(?:white|black|gray|slate|zinc|red|green|blue|amber|yellow)(?:-\d+)?|(?:sm|md|lg|xl|2xl):[\w-]+)(?![\w-])/g

function classesIn(source: string): string {
  return [...source.matchAll(/class="([^"]*)"|'([^'\n]*)'/g)].map(([, plain, quoted]) => plain ?? quoted ?? '').join(' ')
}

const files = ['components', 'layouts', 'pages'].flatMap(folder =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter(name => name.endsWith('.vue')).map(name => `${folder}/${name}`))

describe('the law of the look', () => {
  it('knows a refused class when it sees one', () => {
    expect(classesIn('<i class="rounded-full bg-white md:flex shadow-lg text-ink" />').match(refused)).toEqual(['rounded-full', 'bg-white', 'md:flex', 'shadow-lg'])
  })

  it.each(files)('%s keeps to it', (file) => {
    const source = readFileSync(file, 'utf8')
    expect(classesIn(source).match(refused) ?? []).toEqual([])
    // A style element in a page is refused by the policy the server sends.
    expect(source).not.toMatch(/<style/)
  })
})
