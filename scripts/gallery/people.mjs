/** Who looks at a screen; all are demo users of the seed. */
export const people = {
  clinician: 'ines.okafor@millbrook.example',
  preparer: 'sam.whitfield@millbrook.example',
  /** Of a practice that has asked for nothing yet. */
  newcomer: 'amara.diallo@northgate.example',
  radiologist: 'tomas.brandt@northshore.example',
  lead: 'helen.marsh@northshore.example',
  scheduler: 'leila.farouk@northshore.example',
  administrator: 'ruth.adler@northshore.example',
}
