import { describe, expect, it } from 'vitest'
import { filesBelow, read } from './files'

const catalogue = filesBelow('shared/words', /\.ts$/)
const screens = ['components/safety', 'components/air', 'pages'].flatMap(folder => filesBelow(folder, /\.vue$/))

describe('air and chemicals', () => {
  it('are never drawn or written in green', () => {
    const air = screens.filter(file => /safety|air/i.test(file))
    expect(air.length).toBeGreaterThan(8)
    expect(air.filter(file => /verdigris|green/.test(read(file)))).toEqual([])
    expect(/verdigris|green/.test(read('components/hands/ShutRoom.vue'))).toBe(false)
  })

  it('are granted nothing by any sentence of the catalogue', () => {
    const grants = /\b(all clear|harmless vapour|you may (now )?(go in|enter|spray)|permitted|permission|no danger|no risk|approved|compliant|is clean air|breathe freely)\b/i
    expect(catalogue.flatMap(file => read(file).split('\n').filter(line => grants.test(line.replace(/^\s*(\/\*\*|\*|\/\/).*/, ''))).map(line => `${file}: ${line.trim()}`))).toEqual([])
  })

  it('have no way for a route, a role or a setting to switch a fire call off', () => {
    const writers = filesBelow('server', /\.ts$/).filter(file => /insert\(callChoice\)|update\(callChoice\)/.test(read(file)))
    expect(writers).toEqual(['server/services/calls.ts'])
    expect(read('server/services/calls.ts')).toMatch(/if \(isFixed\(kind\)\) return wanted \? \{ ok: true \} : impossible/)
    expect(read('shared/terms.ts')).toMatch(/fireCallKinds = \['rags', 'vapour'\]/)
    expect(read('db/schema/studio.ts')).toMatch(/call_choice_not_fire.*fireCallKinds/)
  })
})
