import type { DecidableOutcome } from '../contrast/outcome'
import type { LetterKind } from './kinds'

/** One part of a letter. Text only: names and answers inside it are shown as written, never read as markup. */
export interface LetterSection {
  /** Stable, for anchors and tests. */
  id: 'before' | 'appointment' | 'bring' | 'about-contrast' | 'tell-us' | 'used' | 'after' | 'warning-signs' | 'changed' | 'call'
  heading: string
  paragraphs: string[]
  items: string[]
}

/** A letter to the patient, as structure. A screen or a mail turns it into a page; nothing in it is HTML. */
export interface Letter {
  kind: LetterKind
  language: 'en'
  /** Department and the patient's full name, for the line above the title. */
  from: string
  to: string
  /** The mark drawn beside the title; null where no exam takes place. */
  mark: DecidableOutcome | null
  title: string
  opening: string[]
  sections: LetterSection[]
  /** Always present: what this page is and is not. */
  caution: string
  /** For a mail without the patient's agreement to details: names no exam and no reason. */
  neutralSubject: string
  /** For a mail with that agreement. */
  detailedSubject: string
}
