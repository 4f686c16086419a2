import type { Reference } from './resources'
import type { EhrSettings } from './settings'

/**
 * Whether a reference names this patient on this server: relative, absolute under the base URL or a trusted origin, with
 * or without a version (R4 References). Anything else, a missing reference included, is another patient.
 */
export function namesPatient(reference: Reference | undefined, patientId: string, settings: EhrSettings): boolean {
  const text = reference?.reference?.trim()
  if (!text) return false
  const local = relativePart(text, settings)
  const match = local === null ? null : /^Patient\/([^/?#]+)(?:\/_history\/[^/?#]+)?$/.exec(local)
  return match?.[1] === patientId || match?.[1] === encodeURIComponent(patientId)
}

/** `Type/id` of a reference to this server, or null where it leads elsewhere, inside or nowhere. */
export function localTarget(reference: Reference | undefined, settings: EhrSettings): { type: string, id: string } | null {
  const local = reference?.reference ? relativePart(reference.reference.trim(), settings) : null
  const match = local === null ? null : /^([A-Z][A-Za-z]+)\/([^/?#]+)(?:\/_history\/[^/?#]+)?$/.exec(local)
  return match?.[1] && match[2] ? { type: match[1], id: match[2] } : null
}

function relativePart(text: string, settings: EhrSettings): string | null {
  if (!/^[a-z][a-z0-9+.-]*:/i.test(text)) return text.startsWith('/') || text.startsWith('#') ? null : text
  if (text.startsWith(`${settings.baseUrl}/`)) return text.slice(settings.baseUrl.length + 1)
  const url = URL.canParse(text) ? new URL(text) : null
  if (!url || !settings.pageOrigins.includes(url.origin)) return null
  return /[A-Z][A-Za-z]+\/[^/]+(?:\/_history\/[^/]+)?$/.exec(url.pathname)?.[0] ?? null
}
