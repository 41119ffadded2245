import { describe, expect, it } from 'vitest'
import { filesBelow, read } from './files'

describe('a page with jobs on it', () => {
  const pages = filesBelow('pages', /\.vue$/).filter(file => /<(HandsJob|HandsSection|PieceSurface|StudioDrawing)\b/.test(read(file)))

  it('lets them tell acts and read advice', () => {
    expect(pages.length).toBeGreaterThanOrEqual(4)
    for (const file of pages) {
      expect(read(file), file).toContain('provideTelling(')
      expect(read(file), file).toContain('provideAdvice(')
    }
  })
})
