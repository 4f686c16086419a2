import type { DecidableOutcome } from '#shared/domain/contrast/outcome'

const ring = (size: number) => circle(size, '#ffffff')
const disc = (size: number) => circle(size, '#e39a1c')
const withCenter = (size: number, color: string, center: string) => circle(size, color, center)

/** The contrast mark in styles alone, since mail programs hold back images. The title beside it says the same in words. */
const marks = {
  'none': ring(28),
  'iv-with-and-without': ring(28) + disc(36),
  'iv-with-only': disc(36),
  'iv-hepatobiliary': ring(28) + withCenter(36, '#e39a1c', '#16202a'),
  'intra-articular': withCenter(36, '#ffffff', '#e39a1c'),
} as const satisfies Record<DecidableOutcome, string>

export function markPart(outcome: DecidableOutcome): string {
  return `<mj-text line-height="44px" padding="0 24px 8px"><span aria-hidden="true">${marks[outcome]}</span></mj-text>`
}

function circle(size: number, color: string, center?: string): string {
  const inner = center ? `<span style="display:block;width:12px;height:12px;margin:${(size - 12) / 2}px auto 0;border-radius:50%;background-color:${center}"></span>` : ''
  return `<span style="display:inline-block;vertical-align:middle;width:${size}px;height:${size}px;border:4px solid #16202a;border-radius:50%;background-color:${color};margin-right:-2px">${inner}</span>`
}
