import { describe, expect, it } from 'vitest'
import { filesBelow, read } from './files'

const map = read('DEVELOPERS.md')
const readme = read('README.md')
const manifest = JSON.parse(read('package.json')) as Record<'dependencies' | 'devDependencies' | 'scripts', Record<string, string>>
const files = filesBelow('.', /./)

/** `a/{b,c}.ts` as `a/b.ts` and `a/c.ts`. */
function braced(text: string): string[] {
  const [, before = '', inner = '', after = ''] = /^(.*?)\{([^}]*)\}(.*)$/.exec(text) ?? []
  return inner ? inner.split(',').flatMap(each => braced(before + each + after)) : [text]
}

/** Files and folders that a document names between backticks: what has an ending of ours, or begins with a folder of the root. */
function named(document: string): string[] {
  const roots = new Set(files.filter(file => file.includes('/')).map(file => file.split('/')[0]))
  return [...document.matchAll(/`([\w.\-/[\]{},*]+)`/g)].flatMap(([, text = '']) => braced(text))
    .filter(text => /\.(?:ts|vue|mjs|css|md|png)$/.test(text) || (text.includes('/') && roots.has(text.split('/')[0] ?? '')))
}

/** A path from the root, or the end of one; a folder may stand with or without its slash, `/*` for what is in it. */
const exists = (path: string) => files.some(file => `/${file}`.endsWith(`/${path}`) || `/${file}`.includes(`/${path.replace(/\/\*?$/, '')}/`))

describe('the documents', () => {
  it('name no file or folder that is not there', () => {
    const paths = [...named(map), ...named(readme)]
    expect(paths.length).toBeGreaterThan(80)
    expect(paths.filter(path => !exists(path))).toEqual([])
  })

  it('draw no folder on the map that is not there', () => {
    const drawn = /```\n(app\.vue[\s\S]*?)```/.exec(map)?.[1] ?? ''
    const folders = drawn.split('\n').map(line => /^\s*[a-z-]+\//.exec(line)?.[0].trim() ?? '').filter(Boolean)
    expect(folders.length).toBeGreaterThan(20)
    expect(folders.filter(folder => !exists(folder))).toEqual([])
  })

  it('name no command that npm does not know', () => {
    const commands = [...`${map}${readme}`.matchAll(/`npm run (?:--silent )?([\w:-]+)/g)].map(([, name = '']) => name)
    expect(commands.length).toBeGreaterThan(8)
    expect(commands.filter(name => !manifest.scripts[name])).toEqual([])
  })

  // A package of types is there because its package is.
  it('say why each package is there, and of none that is not', () => {
    const table = map.slice(map.indexOf('## Dependencies'))
    const said = [...table.matchAll(/^\| ([^|]+) \|/gm)].slice(1).flatMap(([, cell = '']) => cell.split(', ').map(name => name.trim()))
    const kept = Object.keys({ ...manifest.dependencies, ...manifest.devDependencies }).filter(name => !name.startsWith('@types/'))
    expect(said.sort()).toEqual(kept.sort())
  })

  it('leave out no setting that the server reads', () => {
    const asked = [...filesBelow('server', /\.ts$/), 'scripts/start.mjs'].flatMap(file => read(file).match(/STILLWET_[A-Z]+(?:_[A-Z]+)*(?!_)\b/g) ?? [])
    const listed = read('.env.example')
    expect([...new Set(asked)].filter(name => !listed.includes(`#${name}=`))).toEqual([])
  })
})
