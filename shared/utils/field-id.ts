/**
 * The element id of the control that holds a form path, so that an error summary can link to it.
 * `screening.pregnancy` becomes `field-screening-pregnancy`.
 */
export function fieldId(path: string): string {
  return `field-${path.replace(/[^A-Za-z0-9]+/g, '-').replace(/-$/, '')}`
}
