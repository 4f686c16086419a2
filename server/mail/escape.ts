const entities = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', '\'': '&#39;' } as const satisfies Record<string, string>

/** Text as HTML that shows exactly this text, between tags and inside quoted attributes alike. */
export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, found => entities[found as keyof typeof entities])
}

/** Text for a header: one line, without anything that could begin another header. */
export function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\u2028\u2029]+/gu, ' ').trim()
}
