import { existsSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { fileName, widths } from './camera.mjs'

const escape = (text) => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('"', '&quot;')

/** One page with every picture that exists, in the order of the list. @returns its path */
export function writeIndex({ out, states }) {
  const figures = states.flatMap((state) => {
    const shots = Object.keys(widths).filter((width) => existsSync(join(out, fileName(state.name, width))))
    if (shots.length === 0) return []
    const images = shots.map((width) => `<a href="${fileName(state.name, width)}"><img loading="lazy" class="${width}" src="${fileName(state.name, width)}" alt="${escape(state.name)}, ${width}"></a>`)
    return [`<section><h2>${escape(state.name)}</h2><div>${images.join('')}</div></section>`]
  })
  const page = `<!doctype html><html lang="en"><meta charset="utf-8"><title>Wherefore: every screen</title>
<style>body{font:15px/1.4 sans-serif;margin:24px;background:#f6f5f1;color:#16202a}section{margin:0 0 40px}div{display:flex;gap:16px;align-items:flex-start}
img{border:1px solid #86827a;background:#fff}.wide{width:900px}.phone{width:240px}</style><h1>Every screen</h1>${figures.join('\n')}</html>\n`
  const file = join(out, 'index.html')
  writeFileSync(file, page)
  return file
}
