import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { firstLoad, measure, type Manifest } from '../../scripts/lib/size-budget.ts'

const manifest: Manifest = {
  'index.html': {
    file: 'assets/index.js',
    isEntry: true,
    imports: ['_vue.js'],
    css: ['assets/index.css'],
    assets: ['assets/inter-interface-1.woff2', 'assets/inter-latin-wght-normal-1.woff2'],
  },
  '_vue.js': { file: 'assets/vue.js' },
  '_rows.js': { file: 'assets/rows.js', imports: ['_vue.js'] },
  'src/views/BoardView.vue': {
    file: 'assets/board.js',
    imports: ['index.html', '_rows.js'],
    css: ['assets/board.css'],
  },
  'src/views/ItemsView.vue': { file: 'assets/items.js', imports: ['_grid.js'] },
  '_grid.js': { file: 'assets/grid.js' },
}

describe('firstLoad', () => {
  const load = firstLoad(manifest, 'src/views/BoardView.vue')

  it('holds the entry and the view with everything they import, each once', () => {
    expect(load.scripts.sort()).toEqual([
      'assets/board.js',
      'assets/index.js',
      'assets/rows.js',
      'assets/vue.js',
    ])
    expect(load.styles.sort()).toEqual(['assets/board.css', 'assets/index.css'])
  })

  it('counts the Latin subset of a font only', () => {
    expect(load.fonts).toEqual(['assets/inter-interface-1.woff2'])
  })

  it('refuses a view that was not built', () => {
    expect(() => firstLoad(manifest, 'src/views/GoneView.vue')).toThrow('no src/views/GoneView.vue')
  })
})

describe('measure', () => {
  it('weighs text packed and fonts as they are', () => {
    const dist = mkdtempSync(join(tmpdir(), 'halyard-size-'))
    for (const file of ['index.html', 'a.js', 'a.css', 'f.woff2'])
      writeFileSync(join(dist, file), 'x'.repeat(5000))
    const size = measure(dist, { scripts: ['a.js'], styles: ['a.css'], fonts: ['f.woff2'] })
    rmSync(dist, { recursive: true })
    expect(size.fontBytes).toBe(5000)
    expect(size.scriptBytes).toBeLessThan(100)
    expect(size.pageBytes).toBe(size.styleBytes)
  })
})
